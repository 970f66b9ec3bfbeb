import type { Metadata } from "next";
import Link from "next/link";
import { UseLinkForm } from "../../_components/use-link-form";
import { AFTER_SIGN_IN } from "../../after-sign-in";

export const metadata: Metadata = { title: "Sign in" };

/**
 * Where the mail's link leads. It waits for a press, because scanners of mail open every link they find and would use it up.
 * Where to go after is checked once more by Auth.js when the button is pressed.
 */
export default async function LinkPage({ searchParams }: PageProps<"/sign-in/link">) {
  const { token, email, callbackUrl } = await searchParams;
  if (typeof token !== "string" || typeof email !== "string") {
    return (
      <>
        <h1 className="text-3xl">This link is not whole</h1>
        <p>
          Some mail programs break long links. Copy all of it into the address bar, or{" "}
          <Link href="/sign-in" className="text-link">
            ask for a new one
          </Link>
          .
        </p>
      </>
    );
  }
  return (
    <>
      <h1 className="text-3xl md:text-4xl">Sign in</h1>
      <p className="text-lg">
        as <strong className="break-all">{email}</strong>
      </p>
      <UseLinkForm
        fields={{
          token,
          email,
          callbackUrl: typeof callbackUrl === "string" ? callbackUrl : AFTER_SIGN_IN,
        }}
      />
      <p className="text-sm text-ink-2">
        Did you not ask for this? Close the page: nobody is signed in until the button is pressed.
      </p>
    </>
  );
}
