import "server-only";
import { and, eq, gte, inArray, isNull, lt, ne, sql } from "drizzle-orm";
import { db } from "@/db/client";
import {
  auditionDays, auditionRooms, blocks, callbackInvitations, callbackRounds, called, calls, choices, people, pianistSessions,
  roles, rooms, signUps, slotAssignments, travelTimes,
} from "@/db/schema";
import { localDay } from "@/lib/format-dates";
import { groupBy } from "@/lib/group-by";
import type { Actor } from "@/lib/permissions/types";
import { findClashes } from "@/lib/schedule/find-clashes";
import type { Clash, ScheduledCall } from "@/lib/schedule/types";
import { listProductions } from "./productions";
import type { ProductionListed } from "./productions";

export type SeasonEvent = {
  id: string;
  productionId: string;
  kind: "audition" | "callback" | (typeof calls.$inferSelect)["kind"];
  from: Date;
  to: Date;
  zone: string;
  room: string | null;
  /** Whether the actor has to be there. */
  mine: boolean;
};

export type SeasonClash = { who: string; from: Date; to: Date; zone: string; eventIds: string[]; kind: Clash["kind"]; short: number | null };

export type Season = {
  productions: ProductionListed[];
  events: SeasonEvent[];
  clashes: SeasonClash[];
  progress: SeasonProgress[];
};

export type SeasonProgress = {
  productionId: string;
  roles: number;
  rolesCast: number;
  signUps: number;
  unplaced: number;
  unanswered: number;
  roomsWithoutPianist: number;
};

const MUSIC_TEAM = new Set(["music_director", "assistant_md"]);
const WHOLE_PRODUCTION = new Set([...MUSIC_TEAM, "stage_manager", "director", "choreographer", "producer"]);

/**
 * Everything the actor works in between two days, over all their companies: productions, what happens when, clashes of
 * people and rooms among it, and what each production still needs. Only productions whose plans the actor may read.
 */
export async function readSeason(actor: Actor, window: { from: Date; to: Date }): Promise<Season> {
  const visible = (await listProductions(actor)).filter(
    (p) => p.positions.length === 0 || p.positions.some((kind) => WHOLE_PRODUCTION.has(kind)),
  );
  const ids = visible.map((p) => p.id);
  if (ids.length === 0) return { productions: [], events: [], clashes: [], progress: [] };
  const personByCompany = new Map(actor.people.map((p) => [p.companyId, p.id]));
  const personOf = (productionId: string): string | undefined =>
    personByCompany.get(visible.find((p) => p.id === productionId)?.companyId ?? "");
  const leads = (productionId: string): boolean =>
    visible.find((p) => p.id === productionId)?.positions.some((kind) => MUSIC_TEAM.has(kind)) ?? false;

  const [days, rounds, callRows, calledRows, playing] = await Promise.all([
    db
      .select({ id: auditionDays.id, roomRow: auditionRooms.id, productionId: auditionDays.productionId, from: auditionRooms.opensAt, to: auditionRooms.closesAt, zone: auditionDays.zone, roomId: rooms.id, venueId: rooms.venueId, room: rooms.name })
      .from(auditionRooms)
      .innerJoin(auditionDays, eq(auditionDays.id, auditionRooms.dayId))
      .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
      .where(and(inArray(auditionDays.productionId, ids), isNull(auditionDays.removedAt), lt(auditionRooms.opensAt, window.to), gte(auditionRooms.closesAt, window.from))),
    db
      .select({ id: callbackRounds.id, productionId: callbackRounds.productionId, from: callbackRounds.startsAt, to: callbackRounds.endsAt, zone: callbackRounds.zone, roomId: rooms.id, venueId: rooms.venueId, room: rooms.name })
      .from(callbackRounds)
      .leftJoin(rooms, eq(rooms.id, callbackRounds.roomId))
      .where(and(inArray(callbackRounds.productionId, ids), lt(callbackRounds.startsAt, window.to), gte(callbackRounds.endsAt, window.from))),
    db
      .select({ id: calls.id, productionId: calls.productionId, kind: calls.kind, from: calls.startsAt, to: calls.endsAt, zone: calls.zone, roomId: rooms.id, venueId: rooms.venueId, room: rooms.name, leaderId: calls.leaderId, pianistId: calls.pianistId })
      .from(calls)
      .leftJoin(rooms, eq(rooms.id, calls.roomId))
      .where(and(inArray(calls.productionId, ids), ne(calls.state, "cancelled"), lt(calls.startsAt, window.to), gte(calls.endsAt, window.from))),
    db
      .selectDistinct({ callId: blocks.callId, personId: called.personId })
      .from(called)
      .innerJoin(blocks, eq(blocks.id, called.blockId))
      .innerJoin(calls, eq(calls.id, blocks.callId))
      .where(and(inArray(calls.productionId, ids), eq(called.excused, false), ne(calls.state, "cancelled"), lt(calls.startsAt, window.to), gte(calls.endsAt, window.from))),
    db
      .select({ auditionRoomId: pianistSessions.auditionRoomId, personId: pianistSessions.personId, from: pianistSessions.startsAt, to: pianistSessions.endsAt })
      .from(pianistSessions)
      .where(and(inArray(pianistSessions.productionId, ids), lt(pianistSessions.startsAt, window.to), gte(pianistSessions.endsAt, window.from))),
  ]);

  const events: SeasonEvent[] = [];
  const scheduled: ScheduledCall[] = [];
  const add = (
    event: Omit<SeasonEvent, "mine">,
    place: { roomId: string | null; venueId: string | null },
    who: string[],
  ): void => {
    const own = personOf(event.productionId);
    events.push({ ...event, mine: own !== undefined && who.includes(own) });
    scheduled.push({ id: event.id, from: event.from, to: event.to, people: [...new Set(who)], ...(place.roomId ? { room: place.roomId } : {}), ...(place.venueId ? { venue: place.venueId } : {}) });
  };

  // An audition day is one event from its first room's opening to its last room's closing; the music director hears it all.
  const byDay = groupBy(days, (row) => row.id);
  for (const [id, dayRooms] of byDay) {
    const first = dayRooms[0];
    if (!first) continue;
    const own = leads(first.productionId) ? personOf(first.productionId) : undefined;
    const pianists = playing.filter((p) => dayRooms.some((r) => r.roomRow === p.auditionRoomId)).map((p) => p.personId);
    add(
      {
        id, productionId: first.productionId, kind: "audition", zone: first.zone, room: dayRooms.map((r) => r.room).join(", "),
        from: new Date(Math.min(...dayRooms.map((r) => r.from.getTime()))),
        to: new Date(Math.max(...dayRooms.map((r) => r.to.getTime()))),
      },
      { roomId: null, venueId: first.venueId },
      [...(own ? [own] : []), ...pianists],
    );
  }
  for (const round of rounds) {
    if (!round.from || !round.to) continue;
    const own = leads(round.productionId) ? personOf(round.productionId) : undefined;
    add({ id: round.id, productionId: round.productionId, kind: "callback", from: round.from, to: round.to, zone: round.zone, room: round.room }, round, own ? [own] : []);
  }
  const calledByCall = groupBy(calledRows, (row) => row.callId);
  for (const call of callRows) {
    const who = (calledByCall.get(call.id) ?? []).map((row) => row.personId);
    add(
      { id: call.id, productionId: call.productionId, kind: call.kind, from: call.from, to: call.to, zone: call.zone, room: call.room },
      call,
      [...who, ...(call.leaderId ? [call.leaderId] : []), ...(call.pianistId ? [call.pianistId] : [])],
    );
  }

  const clashes = await nameClashes(scheduled, events);
  return { productions: visible, events: events.sort((a, b) => a.from.getTime() - b.from.getTime()), clashes, progress: await readProgress(ids) };
}

/** Clashes among the events, by login where people have one (the same person in two companies), with names. */
async function nameClashes(scheduled: ScheduledCall[], events: SeasonEvent[]): Promise<SeasonClash[]> {
  const personIds = [...new Set(scheduled.flatMap((call) => call.people))];
  const roomIds = [...new Set(scheduled.flatMap((call) => (call.room ? [call.room] : [])))];
  const venueIds = [...new Set(scheduled.flatMap((call) => (call.venue ? [call.venue] : [])))];
  const [personRows, roomRows, travel] = await Promise.all([
    personIds.length === 0 ? [] : db.select({ id: people.id, userId: people.userId, name: people.name }).from(people).where(inArray(people.id, personIds)),
    roomIds.length === 0 ? [] : db.select({ id: rooms.id, name: rooms.name }).from(rooms).where(inArray(rooms.id, roomIds)),
    venueIds.length === 0 ? [] : db.select({ a: travelTimes.venueA, b: travelTimes.venueB, minutes: travelTimes.minutes }).from(travelTimes).where(inArray(travelTimes.venueA, venueIds)),
  ]);
  const identity = new Map(personRows.map((row) => [row.id, row.userId ?? row.id]));
  const names = new Map<string, string>([...roomRows.map((r) => [r.id, r.name] as const), ...personRows.map((p) => [p.userId ?? p.id, p.name] as const)]);
  const found = findClashes({
    calls: scheduled.map((call) => ({ ...call, people: call.people.map((id) => identity.get(id) ?? id) })),
    conflicts: [],
    travel,
  });
  return found.map((clash) => ({
    who: names.get(clash.who) ?? "Someone",
    from: clash.from,
    to: clash.to,
    zone: events.find((event) => event.id === clash.calls[0])?.zone ?? "UTC",
    eventIds: clash.calls,
    kind: clash.kind,
    short: clash.short ?? null,
  }));
}

async function readProgress(ids: string[]): Promise<SeasonProgress[]> {
  const counts = async (rows: Promise<{ productionId: string; n: number }[]>) => new Map((await rows).map((row) => [row.productionId, row.n]));
  const n = sql<number>`count(*)`.mapWith(Number);
  const [roleCounts, castCounts, signUpCounts, placedCounts, unansweredCounts, bareRooms] = await Promise.all([
    counts(db.select({ productionId: roles.productionId, n }).from(roles).where(and(inArray(roles.productionId, ids), isNull(roles.removedAt))).groupBy(roles.productionId)),
    counts(
      db
        .select({ productionId: choices.productionId, n: sql<number>`count(distinct ${choices.roleId})`.mapWith(Number) })
        .from(choices)
        .where(and(inArray(choices.productionId, ids), eq(choices.state, "cast"), inArray(choices.kind, ["principal", "alternate"])))
        .groupBy(choices.productionId),
    ),
    counts(db.select({ productionId: signUps.productionId, n }).from(signUps).where(and(inArray(signUps.productionId, ids), inArray(signUps.state, ["listed", "invited", "confirmed"]))).groupBy(signUps.productionId)),
    counts(
      db
        .select({ productionId: signUps.productionId, n: sql<number>`count(distinct ${signUps.id})`.mapWith(Number) })
        .from(slotAssignments)
        .innerJoin(signUps, eq(signUps.id, slotAssignments.signUpId))
        .where(and(inArray(signUps.productionId, ids), inArray(signUps.state, ["listed", "invited", "confirmed"])))
        .groupBy(signUps.productionId),
    ),
    counts(
      db
        .select({ productionId: callbackRounds.productionId, n })
        .from(callbackInvitations)
        .innerJoin(callbackRounds, eq(callbackRounds.id, callbackInvitations.roundId))
        .where(and(inArray(callbackRounds.productionId, ids), isNull(callbackInvitations.supersededAt), isNull(callbackInvitations.answer)))
        .groupBy(callbackRounds.productionId),
    ),
    counts(
      db
        .select({ productionId: auditionDays.productionId, n })
        .from(auditionRooms)
        .innerJoin(auditionDays, eq(auditionDays.id, auditionRooms.dayId))
        .leftJoin(pianistSessions, eq(pianistSessions.auditionRoomId, auditionRooms.id))
        .where(and(inArray(auditionDays.productionId, ids), isNull(auditionDays.removedAt), isNull(pianistSessions.id), gte(auditionRooms.closesAt, new Date())))
        .groupBy(auditionDays.productionId),
    ),
  ]);
  return ids.map((productionId) => ({
    productionId,
    roles: roleCounts.get(productionId) ?? 0,
    rolesCast: castCounts.get(productionId) ?? 0,
    signUps: signUpCounts.get(productionId) ?? 0,
    unplaced: (signUpCounts.get(productionId) ?? 0) - (placedCounts.get(productionId) ?? 0),
    unanswered: unansweredCounts.get(productionId) ?? 0,
    roomsWithoutPianist: bareRooms.get(productionId) ?? 0,
  }));
}

/** The local day of an event, in its own zone. */
export function eventDay(event: Pick<SeasonEvent, "from" | "zone">): string {
  return localDay(event.from, event.zone);
}
