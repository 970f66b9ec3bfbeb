import type { Metadata, Route } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { connection } from "next/server";
import { PageTitle } from "@/components/layout/page-title";
import { EmptyState } from "@/components/ui/empty-state";
import { TimeText } from "@/components/ui/time-text";
import { listLocalMail } from "@/lib/services/mail/local-mailbox";
import { LookAgain } from "./_components/look-again";

export const metadata: Metadata = { title: "Local mailbox" };

export default async function MailboxPage() {
  await connection();
  const messages = await listLocalMail();
  if (messages === null) notFound();
  return (
    <>
      <PageTitle title="Local mailbox" actions={<LookAgain />} />
      {messages.length === 0 ? (
        <EmptyState title="No mail yet">
          Sign-in links, invitations and call sheets arrive here a second or two after they are
          sent.
        </EmptyState>
      ) : (
        <ul className="border-t border-rule">
          {messages.map((message) => (
            <li key={message.id} className="border-b border-rule">
              <Link
                href={`/mailbox/${message.id}` as Route}
                className="flex flex-wrap items-baseline justify-between gap-x-4 py-3 hover:bg-bone"
              >
                <span className="min-w-0">
                  <span className="row-link block">
                    {message.subject === "" ? "No subject" : message.subject}
                  </span>
                  <span className="block text-sm break-all text-ink-2">
                    to {message.to.join(", ")}
                  </span>
                </span>
                <TimeText
                  at={message.date}
                  timeZone="UTC"
                  show="both"
                  className="text-sm text-ink-2"
                />
              </Link>
            </li>
          ))}
        </ul>
      )}
    </>
  );
}
