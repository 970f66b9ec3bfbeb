import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { PageTitle } from "@/components/layout/page-title";
import { TimeText } from "@/components/ui/time-text";
import { readLocalMail } from "@/lib/services/mail/local-mailbox";
import { PlainText } from "../_components/plain-text";

export const metadata: Metadata = { title: "Local mailbox" };

export default async function MessagePage({ params }: PageProps<"/mailbox/[messageId]">) {
  const message = await readLocalMail((await params).messageId);
  if (!message) notFound();
  return (
    <>
      <PageTitle title={message.subject === "" ? "No subject" : message.subject} />
      <dl className="mb-6 grid grid-cols-[auto_1fr] gap-x-4 gap-y-1 text-sm">
        <dt className="text-ink-2">To</dt>
        <dd className="break-all">{message.to.join(", ")}</dd>
        <dt className="text-ink-2">From</dt>
        <dd className="break-all">{message.from}</dd>
        <dt className="text-ink-2">When</dt>
        <dd>
          <TimeText at={message.date} timeZone="UTC" show="both" /> UTC
        </dd>
      </dl>
      <div className="border border-rule bg-sheet p-4">
        <PlainText text={message.text} />
      </div>
      <p className="mt-6">
        <Link href="/mailbox" className="row-link">
          All messages
        </Link>
      </p>
    </>
  );
}
