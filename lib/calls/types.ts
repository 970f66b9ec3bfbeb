import type { Conflict, Interval, TravelTime } from "@/lib/schedule/types";
import type { BlockKind } from "./call-kinds";

/** Somebody of a block: by the score (with the roles that need them) or by hand (with the reason). */
export type CalledPerson = {
  personId: string;
  roleNames: string[];
  source: "score" | "hand";
  reason: string | null;
  /** Needed by the score, but let off by hand. */
  excused: boolean;
};

export type PlannedBlock = Interval & {
  key: string;
  kind: BlockKind;
  minutes: number;
  numberId: string | null;
  label: string | null;
  title: string;
  bars: string | null;
  detail: string | null;
  called: CalledPerson[];
  /** Roles that sing in it and have nobody yet. */
  uncastRoles: string[];
};

/** A call with its times worked out: what clashes are looked for in. */
export type CallPlan = Interval & {
  /** Null while it has never been saved. */
  callId: string | null;
  zone: string;
  roomId: string | null;
  leaderId: string | null;
  pianistId: string | null;
  blocks: PlannedBlock[];
};

/** Time in which somebody is already taken. `label` says it as the reader may know it. */
export type Engagement = Interval & {
  id: string;
  /** The login, or the company's record of a person who has none. */
  who: string;
  plays: boolean;
  callId: string | null;
  label: string;
  venueId: string | null;
};

export type HeldRoom = Interval & { roomId: string; callId: string | null; label: string };

export type RoomKnown = {
  id: string;
  name: string;
  venueId: string;
  venueName: string;
  hasPiano: boolean;
};

export type ConflictKnown = Conflict & {
  id: string;
  personId: string;
  reason: string | null;
  state: "asked" | "agreed";
};

/** Everything around a call that it can clash with. */
export type CallFacts = {
  /** What cannot be in two places, by person: their login, or else the record itself. */
  keys: Map<string, string>;
  names: Map<string, string>;
  conflicts: ConflictKnown[];
  engagements: Engagement[];
  bookings: HeldRoom[];
  rooms: RoomKnown[];
  travel: TravelTime[];
  /** Who could play instead. */
  pianists: { personId: string; name: string }[];
};

/** A clash of one call with one thing, in whole: `minutes` doubled, or for travel missing. */
export type FoundClash = Interval & {
  kind: "person" | "room" | "pianist" | "conflict" | "travel";
  /** Null for a room. */
  personId: string | null;
  /** The engagement, held room or conflict it clashes with. */
  withId: string;
  minutes: number;
};

/** What to do about a clash: one change to the call, in words, ready to be applied. */
export type Remedy =
  | { kind: "room"; label: string; roomId: string }
  | { kind: "pianist"; label: string; personId: string }
  | { kind: "start"; label: string; localDate: string; localTime: string }
  | { kind: "excuse"; label: string; personId: string; reason: string; keys: string[] }
  | { kind: "order"; label: string; keys: string[] };

/** A clash as people read it. */
export type ClashInWords = {
  id: string;
  kind: FoundClash["kind"];
  personId: string | null;
  /** Who, what, and by how many minutes. */
  words: string;
  /** The conflict it comes from, which can be agreed or declined. */
  conflict: { id: string; state: "asked" | "agreed" } | null;
  remedies: Remedy[];
  /** What to do when no change of the call solves it. */
  advice: string;
};
