import "server-only";
import { and, eq, gt, inArray, isNotNull, isNull, lt, ne, or } from "drizzle-orm";
import { db } from "@/db/client";
import {
  auditionDays,
  auditionRooms,
  callbackInvitations,
  callbackRounds,
  calls,
  pianistSessions,
  rooms,
  signUps,
  slotAssignments,
  slots,
} from "@/db/schema";
import { groupBy } from "@/lib/group-by";
import type { Interval } from "@/lib/schedule/types";
import { calledStretches } from "./called-stretches";
import type { Held, SeasonEvent, SeasonProduction } from "./types";

type Found = { events: SeasonEvent[]; held: Held[] };

/** The actor's own record in the company of a production they lead, else undefined. */
type OwnIn = (productionId: string) => string | undefined;

const idsOf = (productions: readonly SeasonProduction[], sees: "auditions" | "callbacks") =>
  productions.filter((p) => p.sees[sees]).map((p) => p.id);

/** What happens in the productions in a time, as far as the actor may see it, and who and what it holds. */
export async function readEvents(
  productions: readonly SeasonProduction[],
  window: Interval,
  ownIn: OwnIn,
): Promise<Found> {
  const found = await Promise.all([
    readAuditions(idsOf(productions, "auditions"), window, ownIn),
    readRounds(idsOf(productions, "callbacks"), window, ownIn),
    readCalls(productions, window),
  ]);
  return {
    events: found
      .flatMap((part) => part.events)
      .sort((a, b) => a.from.getTime() - b.from.getTime() || a.to.getTime() - b.to.getTime()),
    held: found.flatMap((part) => part.held),
  };
}

/** An audition day is one event, from its first room's opening to its last room's closing. */
async function readAuditions(ids: string[], window: Interval, ownIn: OwnIn): Promise<Found> {
  if (ids.length === 0) return { events: [], held: [] };
  const inWindow = and(
    inArray(auditionDays.productionId, ids),
    isNull(auditionDays.removedAt),
    lt(auditionRooms.opensAt, window.to),
    gt(auditionRooms.closesAt, window.from),
  );
  const [dayRooms, playing, singing] = await Promise.all([
    db
      .select({
        dayId: auditionDays.id,
        productionId: auditionDays.productionId,
        from: auditionRooms.opensAt,
        to: auditionRooms.closesAt,
        zone: auditionDays.zone,
        roomId: rooms.id,
        venueId: rooms.venueId,
        room: rooms.name,
      })
      .from(auditionRooms)
      .innerJoin(auditionDays, eq(auditionDays.id, auditionRooms.dayId))
      .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
      .where(inWindow),
    db
      .select({
        dayId: auditionDays.id,
        productionId: auditionDays.productionId,
        personId: pianistSessions.personId,
        from: pianistSessions.startsAt,
        to: pianistSessions.endsAt,
        venueId: rooms.venueId,
      })
      .from(pianistSessions)
      .innerJoin(auditionRooms, eq(auditionRooms.id, pianistSessions.auditionRoomId))
      .innerJoin(auditionDays, eq(auditionDays.id, auditionRooms.dayId))
      .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
      .where(inWindow),
    db
      .select({
        dayId: auditionDays.id,
        personId: signUps.personId,
        from: slots.startsAt,
        to: slots.endsAt,
        venueId: rooms.venueId,
      })
      .from(slotAssignments)
      .innerJoin(signUps, eq(signUps.id, slotAssignments.signUpId))
      .innerJoin(slots, eq(slots.id, slotAssignments.slotId))
      .innerJoin(auditionRooms, eq(auditionRooms.id, slots.auditionRoomId))
      .innerJoin(auditionDays, eq(auditionDays.id, auditionRooms.dayId))
      .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
      .where(and(inWindow, inArray(signUps.state, ["invited", "confirmed"]))),
  ]);
  const events: SeasonEvent[] = [];
  const held: Held[] = [];
  for (const [id, ofDay] of groupBy(dayRooms, (row) => row.dayId)) {
    const [first] = ofDay;
    if (!first) continue;
    const from = new Date(Math.min(...ofDay.map((row) => row.from.getTime())));
    const to = new Date(Math.max(...ofDay.map((row) => row.to.getTime())));
    const room = ofDay.map((row) => row.room).join(", ");
    const { productionId, zone } = first;
    events.push({ id, productionId, kind: "audition", from, to, zone, room, draft: false });
    for (const { from: opens, to: closes, roomId } of ofDay) {
      held.push({ eventId: id, personId: null, roomId, venueId: null, from: opens, to: closes });
    }
    const own = ownIn(productionId);
    if (own) {
      held.push({ eventId: id, personId: own, roomId: null, venueId: first.venueId, from, to });
    }
  }
  for (const { dayId, productionId, ...session } of playing) {
    // Whoever leads the music is held for the whole day already.
    if (session.personId !== ownIn(productionId)) {
      held.push({ ...session, eventId: dayId, roomId: null });
    }
  }
  for (const { dayId, ...slot } of singing) held.push({ ...slot, eventId: dayId, roomId: null });
  return { events, held };
}

async function readRounds(ids: string[], window: Interval, ownIn: OwnIn): Promise<Found> {
  if (ids.length === 0) return { events: [], held: [] };
  const inWindow = and(
    inArray(callbackRounds.productionId, ids),
    isNotNull(callbackRounds.startsAt),
    isNotNull(callbackRounds.endsAt),
    lt(callbackRounds.startsAt, window.to),
    gt(callbackRounds.endsAt, window.from),
  );
  const [rounds, invited] = await Promise.all([
    db
      .select({
        id: callbackRounds.id,
        productionId: callbackRounds.productionId,
        from: callbackRounds.startsAt,
        to: callbackRounds.endsAt,
        zone: callbackRounds.zone,
        issue: callbackRounds.issue,
        roomId: rooms.id,
        venueId: rooms.venueId,
        room: rooms.name,
      })
      .from(callbackRounds)
      .leftJoin(rooms, eq(rooms.id, callbackRounds.roomId))
      .where(inWindow),
    db
      .select({ roundId: callbackRounds.id, personId: callbackInvitations.personId })
      .from(callbackInvitations)
      .innerJoin(callbackRounds, eq(callbackRounds.id, callbackInvitations.roundId))
      .where(
        and(
          inWindow,
          isNull(callbackInvitations.supersededAt),
          or(isNull(callbackInvitations.answer), ne(callbackInvitations.answer, "no")),
        ),
      ),
  ]);
  const singers = groupBy(invited, (row) => row.roundId);
  const events: SeasonEvent[] = [];
  const held: Held[] = [];
  for (const round of rounds) {
    const { id, productionId, from, to, zone, room, roomId, venueId } = round;
    if (!from || !to) continue;
    events.push({
      id,
      productionId,
      kind: "callback",
      from,
      to,
      zone,
      room,
      draft: round.issue === 0,
    });
    if (roomId) held.push({ eventId: id, personId: null, roomId, venueId: null, from, to });
    const own = ownIn(productionId);
    const who = new Set(singers.get(id)?.map((row) => row.personId));
    if (own) who.add(own);
    for (const personId of who) {
      held.push({ eventId: id, personId, roomId: null, venueId, from, to });
    }
  }
  return { events, held };
}

/**
 * Drafts are for those who plan; nobody else is told of a call before it is published. Whom the score calls to a draft is
 * left out for those who plan and may not see the casting; the people of a published call have been told.
 */
async function readCalls(
  productions: readonly SeasonProduction[],
  window: Interval,
): Promise<Found> {
  const planned = productions.filter((p) => p.plans).map((p) => p.id);
  const rows = await db
    .select({
      id: calls.id,
      productionId: calls.productionId,
      kind: calls.kind,
      state: calls.state,
      from: calls.startsAt,
      to: calls.endsAt,
      zone: calls.zone,
      roomId: rooms.id,
      venueId: rooms.venueId,
      room: rooms.name,
      leaderId: calls.leaderId,
      pianistId: calls.pianistId,
    })
    .from(calls)
    .leftJoin(rooms, eq(rooms.id, calls.roomId))
    .where(
      and(
        inArray(
          calls.productionId,
          productions.map((p) => p.id),
        ),
        or(
          eq(calls.state, "published"),
          planned.length > 0
            ? and(eq(calls.state, "draft"), inArray(calls.productionId, planned))
            : undefined,
        ),
        lt(calls.startsAt, window.to),
        gt(calls.endsAt, window.from),
      ),
    );
  const unseen = new Set(productions.filter((p) => !p.sees.casting).map((p) => p.id));
  const stretches = groupBy(
    await calledStretches(
      rows.map(({ id, from, state, productionId }) => ({
        id,
        from,
        castHidden: state === "draft" && unseen.has(productionId),
      })),
    ),
    (row) => row.callId,
  );
  const held: Held[] = [];
  for (const { id, from, to, roomId, venueId, leaderId, pianistId } of rows) {
    if (roomId) held.push({ eventId: id, personId: null, roomId, venueId: null, from, to });
    // Who leads or plays is there from beginning to end, whatever blocks they are called to besides.
    const throughout = new Set([leaderId, pianistId].filter((person) => person !== null));
    for (const personId of throughout) {
      held.push({ eventId: id, personId, roomId: null, venueId, from, to });
    }
    for (const stretch of stretches.get(id) ?? []) {
      if (throughout.has(stretch.personId)) continue;
      held.push({
        eventId: id,
        personId: stretch.personId,
        roomId: null,
        venueId,
        from: stretch.from,
        to: stretch.to,
      });
    }
  }
  return {
    events: rows.map(({ id, productionId, kind, from, to, zone, room, state }) => ({
      id,
      productionId,
      kind,
      from,
      to,
      zone,
      room,
      draft: state === "draft",
    })),
    held,
  };
}
