import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { Notice } from "@/components/ui/notice";
import { getActor } from "@/lib/auth/get-actor";
import { ownPath } from "@/lib/auth/own-path";
import { showInvitation } from "@/lib/data/invitations";
import type { InvitationShown } from "@/lib/data/invitations";
import { AppError } from "@/lib/errors";
import { AcceptForm } from "../../_components/accept-form";

export const metadata: Metadata = { title: "Invitation" };

async function look(token: string): Promise<{ invitation: InvitationShown } | { refusal: string }> {
  try {
    return { invitation: await showInvitation(token) };
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    if (error.code === "not-found") notFound();
    return { refusal: error.message };
  }
}

export default async function InvitationPage({
  params,
  searchParams,
}: PageProps<"/invitation/[token]">) {
  const { token } = await params;
  const to = ownPath((await searchParams)["to"], "");
  const found = await look(token);
  const actor = await getActor();
  if ("refusal" in found) {
    return (
      <>
        <h1 className="text-3xl md:text-4xl">This invitation is closed</h1>
        <p className="text-lg">{found.refusal}</p>
        <Link
          href={`/sign-in${to === "" ? "" : `?to=${encodeURIComponent(to)}`}`}
          className="row-link"
        >
          {actor ? `Go on as ${actor.name}` : "Sign in"}
        </Link>
      </>
    );
  }
  const { company, production, position, name, email, from } = found.invitation;
  const asOther = actor !== null && actor.email !== email;
  return (
    <>
      <div>
        <h1 className="text-3xl md:text-4xl">{name}, you are invited</h1>
        <p className="mt-2 text-lg">
          {from ?? company} has put you down as {position.toLowerCase()}
          {production !== null && (
            <>
              {" "}
              of <cite>{production}</cite>
            </>
          )}{" "}
          at {company}.
        </p>
      </div>
      {asOther && (
        <Notice tone="caution" title={`You are signed in as ${actor.name} (${actor.email}).`}>
          This invitation went to {email}: accepting it signs you in with that address instead. If
          both are yours and you want to keep the first, ask {from ?? company} to invite{" "}
          {actor.email}.
        </Notice>
      )}
      <AcceptForm
        token={token}
        to={to}
        label={actor !== null && !asOther ? "Accept" : "Accept and sign in"}
      />
      <p className="text-sm text-ink-2">
        Sent to <span className="break-all">{email}</span>. If this is not for you, close the page:
        nothing happens until you accept.
      </p>
    </>
  );
}
