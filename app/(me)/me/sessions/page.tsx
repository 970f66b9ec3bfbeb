import type { Metadata } from "next";
import { PageTitle } from "@/components/layout/page-title";
import { EmptyState } from "@/components/ui/empty-state";
import { pageActor } from "@/lib/auth/get-actor";
import { listOwnSessions } from "@/lib/data/pianists/own";
import { SessionCard } from "./_components/session-card";

export const metadata: Metadata = { title: "My sessions" };

export default async function SessionsPage({ searchParams }: PageProps<"/me/sessions">) {
  const actor = await pageActor("/me/sessions");
  const { open } = await searchParams;
  const sessions = await listOwnSessions(actor);
  // The music of the next session lies open; of the others when asked for.
  const opened = sessions.find((session) => session.sessionId === open) ?? sessions[0];
  return (
    <>
      <PageTitle title="My sessions" sub="Where you play next, for whom, and what." />
      {sessions.length === 0 ? (
        <EmptyState title="No sessions ahead">
          Audition rooms and calls that you are put down to play for stand here, with their music,
          as soon as a music director assigns you.
        </EmptyState>
      ) : (
        <ol className="flex flex-col gap-10">
          {sessions.map((session) => (
            <li key={session.sessionId} id={session.sessionId}>
              <SessionCard session={session} open={session === opened} />
            </li>
          ))}
        </ol>
      )}
    </>
  );
}
