import type { EventKind } from "./note-shape";

export type SeasonEvent = {
  id: string;
  kind: EventKind;
  /** "2027-03-11", in the zone of the company. */
  localDate: string;
  /** Minutes after midnight of its start. */
  minutesOfDay: number;
  /** What and where, in words. */
  label: string;
};

export type SeasonProduction = {
  id: string;
  title: string;
  /** A second line: what comes next. */
  sub?: string;
  href?: string;
  /** Smalt for what is no production, such as singers' run-throughs. */
  tone?: "ink" | "smalt";
  events: readonly SeasonEvent[];
};

export type SeasonGroup = { label: string; productions: readonly SeasonProduction[] };

export type SeasonWeek = {
  number: number;
  /** Its first day, "2027-03-08". */
  start: string;
  /** The day as it is written over the bar, "8 Mar". */
  label: string;
};

export type SeasonClash = {
  localDate: string;
  minutesOfDay: number;
  /** The staves it goes across. */
  productionIds: readonly string[];
  label: string;
};
