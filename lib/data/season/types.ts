import type { CallKind } from "@/lib/calls/call-kinds";
import type { ClashKind, Interval } from "@/lib/schedule/types";
import type { ProductionListed } from "../productions";

/** A production whose calls the actor may read, and what else of it they may see. */
export type SeasonProduction = ProductionListed & {
  castPublished: boolean;
  sees: {
    score: boolean;
    auditions: boolean;
    callbacks: boolean;
    casting: boolean;
    conflicts: boolean;
  };
  /** Whether the actor leads its music, and so hears its auditions and callbacks. */
  leads: boolean;
  /** Whether the actor may move its calls. */
  plans: boolean;
};

export type SeasonEventKind = "audition" | "callback" | CallKind;

export type SeasonEvent = Interval & {
  id: string;
  productionId: string;
  kind: SeasonEventKind;
  zone: string;
  room: string | null;
  /** Only planned: nobody has been told. */
  draft: boolean;
};

/** What the actor does in productions they do not run: their own calls, sessions and auditions. */
export type OwnElsewhere = Interval & {
  id: string;
  kind: SeasonEventKind;
  production: string;
  zone: string;
};

/**
 * Somebody, or a room, held by an event for a stretch of it. `personId` is a company's record; a room has none. The
 * stretch may be shorter than the event: a person called to two blocks is held for those.
 */
export type Held = Interval & {
  eventId: string;
  personId: string | null;
  roomId: string | null;
  venueId: string | null;
};

export type SeasonClash = Interval & {
  id: string;
  kind: ClashKind;
  /** Names, the actor's own as "You" first; for kind "room" the room's. */
  who: string[];
  zone: string;
  /** The actor's events that clash, the earlier first: one where the other is elsewhere or is a conflict. */
  eventIds: string[];
  /** Whether the other side is in a production that is not the actor's to see: engaged, and no more is said. */
  elsewhere: boolean;
  /** Minutes missing for the way between two venues. */
  short: number | null;
};

export type SeasonProgress = {
  productionId: string;
  /** Null where the actor may not see it. */
  roles: { all: number; cast: number } | null;
  signUps: { all: number; unplaced: number; roomsWithoutPianist: number } | null;
  unanswered: number | null;
};
