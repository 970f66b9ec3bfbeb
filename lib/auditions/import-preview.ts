import type { SingerRowInput } from "@/lib/schemas/auditions";

/** One row of a list of singers: what it says, what is wrong with it, and what it would become. */
export type ImportRow = {
  /** The row's number as the spreadsheet shows it. */
  line: number;
  values: SingerRowInput;
  problems: string[];
  becomes: "new person" | "known person" | "signed up" | "problem";
  /** The name the company has for this address, where the sheet has another. */
  knownAs: string | null;
};

export type ImportPreview = {
  rows: ImportRow[];
  /** Headings that mean nothing here; their columns are left out. */
  unknownColumns: string[];
};
