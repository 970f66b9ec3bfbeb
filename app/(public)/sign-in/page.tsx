import type { Metadata, Route } from "next";
import Link from "next/link";
import { redirect } from "next/navigation";
import { Notice } from "@/components/ui/notice";
import { getActor } from "@/lib/auth/get-actor";
import { ownPath } from "@/lib/auth/own-path";
import { LinkForm } from "../_components/link-form";
import { PasswordForm } from "../_components/password-form";
import { AFTER_SIGN_IN } from "../after-sign-in";
import { signInError } from "./sign-in-error";

export const metadata: Metadata = { title: "Sign in" };

export default async function SignInPage({ searchParams }: PageProps<"/sign-in">) {
  const { to, error, email } = await searchParams;
  const path = ownPath(to, "");
  const words = signInError(error);
  const actor = await getActor();
  const goOn = (path || AFTER_SIGN_IN) as Route;
  if (actor && words === null) redirect(goOn);
  return (
    <>
      <h1 className="text-3xl md:text-4xl">Sign in</h1>
      {words !== null && (
        <Notice tone="error" title="You are not signed in by that link.">
          {words}
        </Notice>
      )}
      {actor && (
        <Notice tone="info" title={`You are signed in as ${actor.name} already.`}>
          <Link href={goOn} className="text-link">
            Go on
          </Link>
        </Notice>
      )}
      <LinkForm to={path} {...(typeof email === "string" && { email })} />
      <p className="text-sm text-ink-2">
        No password needed: the link in the mail signs you in. It is good for 30 minutes.
      </p>
      <PasswordForm to={path} />
    </>
  );
}
