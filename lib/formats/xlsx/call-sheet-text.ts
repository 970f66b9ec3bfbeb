import type { CallSheet } from "@/lib/call-sheets/types";
import { toLocal } from "@/lib/schedule/to-local";

export const BLOCK_HEADINGS = ["When", "What", "Bars", "Who", "Where", "Pianist"] as const;

/** A call sheet as lines of text, the same for every file it is written to. */
export interface CallSheetText {
  production: string;
  date: string;
  company: string;
  issue: string;
  /** One row per block, in the order of BLOCK_HEADINGS. */
  blocks: string[][];
  sections: { heading: string; lines: string[] }[];
}

/** Puts a call sheet's snapshot into words: dates in full, one text per cell, empty sections left out. */
export function callSheetText(sheet: CallSheet): CallSheetText {
  const issued = toLocal(new Date(sheet.issuedAt), sheet.zone);
  const replaces = sheet.replaces === undefined ? "" : `, replaces ${sheet.replaces}`;
  const sections = [
    { heading: "Changed", lines: sheet.changed },
    { heading: "Released", lines: sheet.released.map(({ who, at }) => `${who} ${at}`) },
    { heading: "Music", lines: sheet.music },
    { heading: "Tomorrow", lines: sheet.tomorrow },
    { heading: "Away", lines: sheet.away },
    { heading: "Notes", lines: sheet.notes },
    { heading: "Contact", lines: sheet.contact === undefined ? [] : [sheet.contact] },
  ];
  return {
    production: sheet.productionTitle,
    date: dateInWords(sheet.localDate),
    company: sheet.companyName,
    issue: `Issue ${String(sheet.issueNumber)}, sent ${dateInWords(issued.date)}, ${issued.time}${replaces}`,
    blocks: sheet.blocks.map((block) => [
      `${block.from}–${block.to}`,
      [[block.numberLabel, block.title].filter(Boolean).join(" "), block.detail]
        .filter(Boolean)
        .join("\n"),
      block.bars ?? "",
      block.who.join(", "),
      block.where,
      block.pianist ?? "",
    ]),
    sections: sections.filter(({ lines }) => lines.length > 0),
  };
}

/** `2027-04-06` as "Tuesday 6 April 2027". */
function dateInWords(localDate: string): string {
  return new Intl.DateTimeFormat("en-GB", {
    weekday: "long",
    day: "numeric",
    month: "long",
    year: "numeric",
    timeZone: "UTC",
  })
    .format(new Date(`${localDate}T00:00:00Z`))
    .replace(",", "");
}
