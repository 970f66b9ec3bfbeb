/** A stretch of time, half-open: `from` belongs to it, `to` does not. */
export interface Interval {
  from: Date;
  to: Date;
}

/** A date and a time on the wall clock of one place: `2027-03-20` and `18:30`. */
export interface LocalTime {
  date: string;
  time: string;
}

/**
 * An instant found from a wall clock. `note` says that the clocks changed then: the time did not exist
 * ("skipped", the instant lies after the change) or came twice ("repeated", the instant is the first).
 */
export interface InstantResult {
  instant: Date;
  note?: "skipped" | "repeated";
}

export type DayItemKind = "slot" | "hold" | "rest" | "lunch";

/** One stretch of an audition room's day. A hold is a slot kept free for late-comers. */
export interface DayItem extends Interval {
  kind: DayItemKind;
}

/** How an audition room's day is laid out. Minutes are whole and above zero. */
export interface SlotPlan {
  opens: Date;
  closes: Date;
  slotMinutes: number;
  /** The pianist rests `restMinutes` before playing more than `afterMinutes` on end. */
  rest?: { afterMinutes: number; restMinutes: number };
  /** Lunch lies inside its window; it counts as a rest. */
  lunch?: { minutes: number; windowFrom: Date; windowTo: Date };
  /** One slot in every so many minutes of hearing is kept free. */
  holdEveryMinutes?: number;
}

export type SlotPlanReason =
  | "minutes-not-whole"
  | "closes-before-it-opens"
  | "no-slot-fits"
  | "slot-longer-than-playing-time"
  | "lunch-longer-than-its-window";

export type SlotPlanResult =
  { ok: true; items: DayItem[] } | { ok: false; reason: SlotPlanReason; message: string };

/** A call as the clash finder sees it: when, where and who. */
export interface ScheduledCall extends Interval {
  id: string;
  people: readonly string[];
  room?: string | undefined;
  venue?: string | undefined;
  pianist?: string | undefined;
}

/** Time a person says they cannot attend. */
export interface Conflict extends Interval {
  id?: string | undefined;
  person: string;
}

/** Minutes between two venues, the same both ways. */
export interface TravelTime {
  a: string;
  b: string;
  minutes: number;
}

export type ClashKind = "person" | "room" | "pianist" | "conflict" | "travel";

/**
 * What cannot stand. `who` is a person, or a room for kind "room". `calls` holds the two calls, the
 * earlier first, or the one call for kind "conflict". `from` and `to` are the time doubled; for kind
 * "travel" the gap between the calls, and `short` the minutes missing from it.
 */
export interface Clash extends Interval {
  kind: ClashKind;
  who: string;
  calls: string[];
  conflict?: string;
  short?: number;
}

/** Somebody a block needs, and the roles that make them needed. */
export interface NeededPerson {
  personId: string;
  roleIds: string[];
}

/** Who one block needs. `uncastRoleIds` are roles that sing in it and have nobody yet. */
export interface BlockNeeds {
  blockId: string;
  people: NeededPerson[];
  uncastRoleIds: string[];
}

/** One person's time in a call: when they are first needed and when they may go. */
export interface ReleaseTime {
  personId: string;
  firstCall: Date;
  release: Date;
}
