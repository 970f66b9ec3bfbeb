/** A pitch as read: MIDI number (60 = C4) and the spelling a person reads. */
export interface SheetPitch {
  midi: number;
  spelling: string;
}

/** One singer as the sheet gives them. Times are `10:30`, on the audition day's own clock. */
export interface SingerValues {
  name: string;
  email: string;
  phone?: string;
  pronouns?: string;
  role?: string;
  song?: string;
  bars?: number;
  low?: SheetPitch;
  high?: SheetPitch;
  minor?: boolean;
  notBefore?: string;
  notAfter?: string;
}

export type SingerField = keyof SingerValues;

/** What is wrong with one cell, and what to do about it. */
export interface RowProblem {
  field: SingerField;
  message: string;
}

/** One row of the sheet; `line` is the row number that a spreadsheet shows. No problems: it can go in. */
export interface SingerRow {
  line: number;
  values: SingerValues;
  problems: RowProblem[];
}

export type SheetProblemCode =
  "too-large" | "too-many-rows" | "not-a-spreadsheet" | "damaged" | "no-headings" | "no-rows";

/** Why nothing could be read, and what to do about it. */
export interface SheetProblem {
  code: SheetProblemCode;
  message: string;
}

/** A sheet of singers as read. With a problem there are no rows. */
export interface SingersSheet {
  rows: SingerRow[];
  /** Headings that mean nothing here; their columns were left out. */
  unknownColumns: string[];
  problems: SheetProblem[];
}

export type PaperSize = "A4" | "Letter";
