/** One stretch of the day on a call sheet. Times are the wall clock of the sheet's zone, `18:30`. */
export interface CallSheetBlock {
  /** The block's id, where known: it lets two issues be compared although titles or times changed. */
  id?: string;
  from: string;
  to: string;
  kind: string;
  /** The number's label in the score: "4a". */
  numberLabel?: string;
  title: string;
  /** What of it: "music, from bar 20". */
  detail?: string;
  /** Bars, where only some are worked: "80–140". */
  bars?: string;
  /** People by name, never "company". "(from 20:30)" after a name says a later time within the block. */
  who: string[];
  where: string;
  pianist?: string;
}

/**
 * A call sheet as issued: a plain snapshot that is stored, printed and exported. Lists hold finished
 * sentences or names. `localDate` is `2027-04-06`, `issuedAt` an ISO 8601 instant, `zone` an IANA name.
 */
export interface CallSheet {
  productionTitle: string;
  companyName: string;
  localDate: string;
  zone: string;
  issueNumber: number;
  issuedAt: string;
  /** What this issue replaces, in words: "the one of 12:05". */
  replaces?: string;
  changed: string[];
  blocks: CallSheetBlock[];
  released: { who: string; at: string }[];
  music: string[];
  tomorrow: string[];
  away: string[];
  notes: string[];
  contact?: string;
}
