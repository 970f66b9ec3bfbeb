import type { Metadata, Route } from "next";
import Link from "next/link";
import { acknowledgeSheet } from "@/app/(me)/actions";
import { PageTitle, SectionTitle } from "@/components/layout/page-title";
import { RehearsalMark } from "@/components/layout/rehearsal-mark";
import { Notice } from "@/components/ui/notice";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { readOwnSheet } from "@/lib/data/sheets/own";
import type { OwnSheet } from "@/lib/data/sheets/own";
import { dayAndClock, longDay } from "@/lib/format-dates";
import { AnswerButtons } from "../../(home)/_components/answer-buttons";

export const metadata: Metadata = { title: "Call sheet" };

export default async function OwnSheetPage({ params }: PageProps<"/me/call-sheets/[issueId]">) {
  const { issueId } = await params;
  const actor = await pageActor(`/me/call-sheets/${issueId}`);
  const sheet = await orNotFound(readOwnSheet(actor, issueId));
  return (
    <div className="flex flex-col gap-8">
      <div>
        <PageTitle
          title={longDay(sheet.localDate)}
          sub={
            <>
              <cite>{sheet.production}</cite>, {sheet.company} · issue {sheet.number}, sent{" "}
              {dayAndClock(sheet.issuedAt, sheet.zone)}
            </>
          }
        />
        {sheet.newer !== null && (
          <Notice tone="caution" title="There is a newer issue of this day.">
            <Link href={`/me/call-sheets/${sheet.newer.issueId}` as Route} className="text-link">
              Read issue {sheet.newer.number}
            </Link>
          </Notice>
        )}
      </div>
      <Lines title="Changed for you" lines={sheet.changed} />
      <OwnBlocks sheet={sheet} />
      <Lines title="Notes" lines={sheet.notes} />
      <Lines title="Tomorrow" lines={sheet.tomorrow} />
      {sheet.contact !== null && <p>Questions: {sheet.contact}</p>}
      {sheet.acknowledgedAt === null ? (
        <AnswerButtons
          answers={[
            {
              label: "I have read it",
              action: acknowledgeSheet.bind(null, { issueId }),
              said: "The stage manager sees that you have read it.",
            },
          ]}
        />
      ) : (
        <p className="font-bold text-verdigris">
          You read it: {dayAndClock(sheet.acknowledgedAt, sheet.zone)}.
        </p>
      )}
    </div>
  );
}

function OwnBlocks({ sheet }: { sheet: OwnSheet }) {
  if (sheet.blocks.length === 0) {
    return <p className="text-lg">You are not called on this day.</p>;
  }
  return (
    <section aria-labelledby="called">
      <SectionTitle id="called" ruled>
        You are called {sheet.from === null ? "" : `at ${sheet.from}`}
      </SectionTitle>
      <ol>
        {sheet.blocks.map((block) => (
          <li
            key={block.id ?? `${block.from} ${block.title}`}
            className="flex gap-4 border-b border-rule py-3"
          >
            <p className="w-24 shrink-0 font-bold">
              {block.from}–{block.to}
            </p>
            <div className="min-w-0 flex-1">
              <p className="flex flex-wrap items-baseline gap-x-2 font-serif text-lg">
                {block.numberLabel !== undefined && (
                  <RehearsalMark className="font-sans">{block.numberLabel}</RehearsalMark>
                )}
                {block.title}
              </p>
              <p className="text-sm text-ink-2">
                {[
                  block.numberLabel === undefined ? block.kind : undefined,
                  block.bars === undefined ? undefined : `bars ${block.bars}`,
                  block.detail,
                  block.where,
                  block.pianist,
                ]
                  .filter((part) => part !== undefined && part !== "")
                  .join(" · ")}
              </p>
            </div>
          </li>
        ))}
      </ol>
      {sheet.releasedAt !== null && (
        <p className="mt-2 font-bold">Free to go at {sheet.releasedAt}</p>
      )}
    </section>
  );
}

function Lines({ title, lines }: { title: string; lines: readonly string[] }) {
  if (lines.length === 0) return null;
  return (
    <section>
      <SectionTitle>{title}</SectionTitle>
      <ul className="list-disc pl-5">
        {lines.map((line) => (
          <li key={line}>{line}</li>
        ))}
      </ul>
    </section>
  );
}
