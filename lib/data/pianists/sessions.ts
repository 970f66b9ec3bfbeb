import "server-only";
import { and, asc, eq, gte, inArray, isNull, ne } from "drizzle-orm";
import { db } from "@/db/client";
import {
  auditionDays,
  auditionRooms,
  calls,
  people,
  pianistSessions,
  rooms,
  slots,
} from "@/db/schema";
import { CALL_KIND_NAMES } from "@/lib/calls/call-kinds";
import { readAccompanists } from "@/lib/data/calls/facts";
import { savedCalls } from "@/lib/data/calls/saved";
import { productionFor } from "@/lib/data/guard";
import { groupBy } from "@/lib/group-by";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import { minutesBetween } from "@/lib/schedule/minutes-between";
import type { Interval } from "@/lib/schedule/types";

export type Played = Interval & {
  personId: string;
  name: string;
  state: "assigned" | "confirmed" | "wanted";
};

export type SessionListed = Interval & {
  id: string;
  kind: "audition" | "call";
  /** "Auditions", "Music call". */
  title: string;
  localDate: string;
  zone: string;
  room: string | null;
  /** The audition day or the call it belongs to. */
  dayId: string | null;
  callId: string | null;
  version: number | null;
  draft: boolean;
  played: Played[];
  /** Stretches that want a pianist and have none. */
  gaps: Interval[];
};

export type PianistLoad = { personId: string; name: string; minutes: number; from: Date; to: Date };

export type PianistDay = { localDate: string; sessions: SessionListed[]; loads: PianistLoad[] };

export type PianistPlan = {
  days: PianistDay[];
  accompanists: { personId: string; name: string }[];
  mayAssign: boolean;
  zone: string;
  locale: string;
};

/** Kinds of call at which somebody is expected to play (common practice, no source); the others may do without. */
const WANT_A_PIANIST = new Set(["music", "staging", "choreography", "put_in", "brush_up"]);

/** Every session of a production from a local day on that has a pianist or wants one, by day, with who plays and what is missing. */
export async function listSessions(
  actor: Actor,
  { productionId, since }: { productionId: string; since: string },
): Promise<PianistPlan> {
  const scope = await productionFor(actor, productionId, "pianists:see");
  const [roomRows, callRows, playing, accompanists] = await Promise.all([
    db
      .select({
        id: auditionRooms.id,
        dayId: auditionDays.id,
        localDate: auditionDays.localDate,
        zone: auditionDays.zone,
        from: auditionRooms.opensAt,
        to: auditionRooms.closesAt,
        room: rooms.name,
      })
      .from(auditionRooms)
      .innerJoin(
        auditionDays,
        and(eq(auditionDays.id, auditionRooms.dayId), isNull(auditionDays.removedAt)),
      )
      .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
      .where(and(eq(auditionDays.productionId, scope.id), gte(auditionDays.localDate, since)))
      .orderBy(asc(auditionRooms.opensAt), asc(rooms.name)),
    savedCalls(scope.id, and(ne(calls.state, "cancelled"), gte(calls.localDate, since))),
    db
      .select({
        auditionRoomId: pianistSessions.auditionRoomId,
        callId: pianistSessions.callId,
        personId: people.id,
        name: people.name,
        from: pianistSessions.startsAt,
        to: pianistSessions.endsAt,
        state: pianistSessions.state,
      })
      .from(pianistSessions)
      .innerJoin(people, eq(people.id, pianistSessions.personId))
      .where(eq(pianistSessions.productionId, scope.id))
      .orderBy(asc(pianistSessions.startsAt)),
    readAccompanists(scope),
  ]);
  const lunches = await lunchesOf(roomRows.map((row) => row.id));
  const sessions: SessionListed[] = [
    ...roomRows.map((row): SessionListed => {
      const played = playing.filter((session) => session.auditionRoomId === row.id).map(asPlayed);
      return {
        id: row.id,
        kind: "audition",
        title: "Auditions",
        localDate: row.localDate,
        zone: row.zone,
        room: row.room,
        from: row.from,
        to: row.to,
        dayId: row.dayId,
        callId: null,
        version: null,
        draft: false,
        played,
        gaps: uncovered(row, [...played, ...(lunches.get(row.id) ?? [])]),
      };
    }),
    ...callRows.flatMap((call): SessionListed[] => {
      const held = playing.filter((session) => session.callId === call.id).map(asPlayed);
      const wanted: Played[] =
        held.length === 0 && call.pianistId !== null
          ? [
              {
                personId: call.pianistId,
                name: call.pianist ?? "",
                from: call.startsAt,
                to: call.endsAt,
                state: "wanted",
              },
            ]
          : [];
      const time = { from: call.startsAt, to: call.endsAt };
      const played = [...held, ...wanted];
      if (played.length === 0 && !WANT_A_PIANIST.has(call.kind)) return [];
      return [
        {
          id: call.id,
          kind: "call",
          title: call.title ?? CALL_KIND_NAMES[call.kind],
          localDate: call.localDate,
          zone: call.zone,
          room: call.room,
          ...time,
          dayId: null,
          callId: call.id,
          version: call.version,
          draft: call.state === "draft",
          played,
          gaps: uncovered(time, played),
        },
      ];
    }),
  ].sort(
    (a, b) => a.from.getTime() - b.from.getTime() || (a.room ?? "").localeCompare(b.room ?? ""),
  );
  const byDay = groupBy(sessions, (session) => session.localDate);
  return {
    days: [...byDay]
      .sort(([a], [b]) => (a < b ? -1 : 1))
      .map(([localDate, ofDay]) => ({ localDate, sessions: ofDay, loads: loadsOf(ofDay) })),
    accompanists,
    mayAssign: can(actor, "pianists:assign", {
      companyId: scope.companyId,
      productionId: scope.id,
    }),
    zone: scope.zone,
    locale: scope.locale,
  };
}

function asPlayed({ personId, name, from, to, state }: Played): Played {
  return { personId, name, from, to, state };
}

async function lunchesOf(roomIds: string[]): Promise<Map<string, Interval[]>> {
  if (roomIds.length === 0) return new Map();
  const rows = await db
    .select({ roomId: slots.auditionRoomId, from: slots.startsAt, to: slots.endsAt })
    .from(slots)
    .where(and(inArray(slots.auditionRoomId, roomIds), inArray(slots.kind, ["lunch", "rest"])));
  return groupBy(rows, (row) => row.roomId);
}

/** The stretches of a time that none of the others covers. */
function uncovered(time: Interval, covered: readonly Interval[]): Interval[] {
  const gaps: Interval[] = [];
  let at = time.from;
  for (const stretch of [...covered].sort((a, b) => a.from.getTime() - b.from.getTime())) {
    if (stretch.from > at)
      gaps.push({ from: at, to: stretch.from < time.to ? stretch.from : time.to });
    if (stretch.to > at) at = stretch.to;
  }
  if (at < time.to) gaps.push({ from: at, to: time.to });
  return gaps.filter((gap) => gap.from < gap.to);
}

function loadsOf(sessions: readonly SessionListed[]): PianistLoad[] {
  const byPerson = groupBy(
    sessions.flatMap((session) => session.played),
    (played) => played.personId,
  );
  return [...byPerson.values()]
    .flatMap((theirs) => {
      const [first] = theirs;
      if (!first) return [];
      return [
        {
          personId: first.personId,
          name: first.name,
          minutes: theirs.reduce(
            (sum, played) => sum + Math.round(minutesBetween(played.from, played.to)),
            0,
          ),
          from: new Date(Math.min(...theirs.map((played) => played.from.getTime()))),
          to: new Date(Math.max(...theirs.map((played) => played.to.getTime()))),
        },
      ];
    })
    .sort((a, b) => a.name.localeCompare(b.name));
}
