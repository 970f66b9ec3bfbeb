import type { ReactNode } from "react";
import { RehearsalMark } from "@/components/layout/rehearsal-mark";
import type { CallSheet, CallSheetBlock } from "@/lib/call-sheets/types";
import { dayAndClock, longDay } from "@/lib/format-dates";
import { groupBy } from "@/lib/group-by";
import "./sheet-paper.css";

type Props = {
  sheet: CallSheet;
  paper: "A4" | "Letter";
  locale: string;
  /** Not issued yet: no number and no time of sending. */
  preview?: boolean;
};

/** A call sheet as it prints: black on white, what changed first, names in full. */
export function SheetPaper({ sheet, paper, locale, preview = false }: Props) {
  return (
    <article
      className={`${paper === "A4" ? "paper-a4" : "paper-letter"} border border-rule bg-sheet p-4 text-ink sm:p-8 print:border-0 print:p-0`}
    >
      <header className="flex flex-wrap items-end justify-between gap-x-8 gap-y-2 border-b-4 border-double border-ink pb-3">
        <div>
          <p>
            <cite className="text-xl">{sheet.productionTitle}</cite>
          </p>
          <h2 className="text-3xl">{longDay(sheet.localDate, locale)}</h2>
        </div>
        <p className="text-sm sm:text-right">
          {preview ? (
            <>As it stands now, not issued</>
          ) : (
            <>
              Call sheet, issue {sheet.issueNumber}
              <br />
              sent {dayAndClock(new Date(sheet.issuedAt), sheet.zone, locale)}
            </>
          )}
          {sheet.replaces !== undefined && (
            <>
              <br />
              replaces {sheet.replaces}
            </>
          )}
        </p>
      </header>
      {sheet.changed.length > 0 && (
        <p className="mt-4 border border-ink p-3 text-sm">
          <strong>Changed since the last issue:</strong> {sheet.changed.join("; ")}.
        </p>
      )}
      {sheet.blocks.length === 0 ? (
        <p className="my-8 font-serif text-xl">Nobody is called on this day.</p>
      ) : (
        <SheetTable sheet={sheet} />
      )}
      <div className="mt-6 grid gap-x-8 gap-y-4 border-t border-ink pt-3 text-sm sm:grid-cols-3 print:grid-cols-3">
        <Released released={sheet.released} />
        <Part title="Music" lines={sheet.music} />
        <div className="flex flex-col gap-4">
          <Part title="Next" lines={sheet.tomorrow} />
          <Part title="Away" lines={sheet.away} />
        </div>
      </div>
      <footer className="mt-6 flex flex-wrap justify-between gap-x-8 gap-y-2 border-t-4 border-double border-ink pt-3 text-sm">
        <div className="max-w-prose">
          {sheet.notes.map((note) => (
            <p key={note}>{note}</p>
          ))}
        </div>
        {sheet.contact !== undefined && <p>{sheet.contact}</p>}
      </footer>
    </article>
  );
}

function SheetTable({ sheet }: { sheet: CallSheet }) {
  return (
    <table
      role="table"
      className="mt-4 w-full border-collapse text-left text-sm max-sm:block print:table"
    >
      <caption className="sr-only">Who is called when, for what and where</caption>
      <thead role="rowgroup" className="max-sm:sr-only print:not-sr-only print:table-header-group">
        <tr role="row">
          {["When", "What", "Who", "Where"].map((heading) => (
            <th
              key={heading}
              role="columnheader"
              scope="col"
              className="border-b border-ink py-2 pr-3"
            >
              {heading}
            </th>
          ))}
        </tr>
      </thead>
      <tbody role="rowgroup" className="max-sm:block print:table-row-group">
        {sheet.blocks.map((block) => (
          <tr
            key={block.id ?? block.from}
            role="row"
            className="border-b border-ink max-sm:block max-sm:py-2 print:table-row"
          >
            <Cell className="font-bold whitespace-nowrap">
              {block.from}–{block.to}
            </Cell>
            <Cell className="sm:w-1/4">
              <What block={block} />
            </Cell>
            <Cell>{block.who.join(", ")}</Cell>
            <Cell>{block.where}</Cell>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function Cell({ children, className = "" }: { children: ReactNode; className?: string }) {
  return (
    <td
      role="cell"
      className={`py-2 pr-3 align-top max-sm:block max-sm:py-0.5 print:table-cell print:py-2 ${className}`}
    >
      {children}
    </td>
  );
}

function What({ block }: { block: CallSheetBlock }) {
  const detail = [block.detail ?? "", block.bars === undefined ? "" : `bars ${block.bars}`]
    .filter(Boolean)
    .join(", ");
  return (
    <>
      <span className="flex items-baseline gap-1.5">
        {block.numberLabel !== undefined && <RehearsalMark>{block.numberLabel}</RehearsalMark>}
        <span className="font-serif text-lg leading-tight">{block.title}</span>
      </span>
      {detail !== "" && <span className="block">{detail}</span>}
    </>
  );
}

/** Who may go when: people who go together share a line. */
function Released({ released }: { released: CallSheet["released"] }) {
  const byTime = [...groupBy(released, ({ at }) => at)];
  if (byTime.length === 0) return null;
  return (
    <div>
      <h3 className="font-sans text-sm font-bold">Released</h3>
      {byTime.map(([at, people]) => (
        <p key={at}>
          <strong>{at}</strong> {people.map(({ who }) => who).join(", ")}
        </p>
      ))}
    </div>
  );
}

function Part({ title, lines }: { title: string; lines: readonly string[] }) {
  if (lines.length === 0) return null;
  return (
    <div>
      <h3 className="font-sans text-sm font-bold">{title}</h3>
      {lines.map((line) => (
        <p key={line}>{line}</p>
      ))}
    </div>
  );
}
