import type { CallSheet } from "@/lib/call-sheets/types";
import { BLOCK_HEADINGS, callSheetText } from "./call-sheet-text";
import { guardCell } from "./guard-cell";

/**
 * A call sheet as CSV text: RFC 4180 (commas, quotes, CRLF) after a byte order mark, so that spreadsheets
 * read it as UTF-8. No cell can be taken for a formula. The same lines as the .xlsx, in the same order.
 */
export function writeCallSheetCsv(sheet: CallSheet): string {
  const text = callSheetText(sheet);
  const [changed, rest] = [
    text.sections.filter(({ heading }) => heading === "Changed"),
    text.sections.filter(({ heading }) => heading !== "Changed"),
  ];
  const rows = [
    [text.production],
    [text.date],
    [text.company],
    [text.issue],
    ...changed.flatMap(sectionRows),
    [],
    [...BLOCK_HEADINGS],
    ...text.blocks,
    [],
    ...rest.flatMap(sectionRows),
  ];
  return `\ufeff${rows.map((row) => `${row.map(quote).join(",")}\r\n`).join("")}`;
}

function sectionRows({ heading, lines }: { heading: string; lines: string[] }): string[][] {
  return lines.map((line, index) => [index === 0 ? heading : "", line]);
}

function quote(cell: string): string {
  return `"${guardCell(cell).replaceAll('"', '""')}"`;
}
