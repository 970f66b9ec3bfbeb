import "server-only";
import { and, asc, eq, inArray, isNull } from "drizzle-orm";
import { db } from "@/db/client";
import {
  attendances,
  auditionRooms,
  dayLinks,
  people,
  pianistSessions,
  rooms,
  signUps,
  slotAssignments,
  slots,
  venues,
} from "@/db/schema";
import type { AuditionDayView, SingerOnDay } from "@/lib/auditions/day-view";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import { productionFor } from "../guard";
import { rangesOf } from "../ranges";
import { dayOf } from "./scope";
import { listWaiting } from "./waiting";

/** One audition day as its page shows it and reads again every few seconds: rooms, slots, who sings, pianists, who waits. */
export async function readDay(
  actor: Actor,
  productionId: string,
  dayId: string,
): Promise<AuditionDayView> {
  const scope = await productionFor(actor, productionId, "auditions:read");
  const day = await dayOf(db, scope.id, dayId);
  const held = await db
    .select({
      id: auditionRooms.id,
      roomId: auditionRooms.roomId,
      name: rooms.name,
      venue: venues.name,
      opensAt: auditionRooms.opensAt,
      closesAt: auditionRooms.closesAt,
    })
    .from(auditionRooms)
    .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
    .innerJoin(venues, eq(venues.id, rooms.venueId))
    .where(eq(auditionRooms.dayId, day.id))
    .orderBy(asc(venues.name), asc(rooms.name));
  const roomIds = held.map((room) => room.id);
  const [items, sessions, waiting, links] = await Promise.all([
    listItems(day.id, roomIds),
    roomIds.length === 0
      ? []
      : db
          .select({
            id: pianistSessions.id,
            auditionRoomId: pianistSessions.auditionRoomId,
            personId: people.id,
            name: people.name,
            startsAt: pianistSessions.startsAt,
            endsAt: pianistSessions.endsAt,
          })
          .from(pianistSessions)
          .innerJoin(people, eq(people.id, pianistSessions.personId))
          .where(inArray(pianistSessions.auditionRoomId, roomIds))
          .orderBy(asc(pianistSessions.startsAt)),
    listWaiting(db, scope.id),
    db
      .select({ id: dayLinks.id })
      .from(dayLinks)
      .where(and(eq(dayLinks.dayId, day.id), isNull(dayLinks.revokedAt))),
  ]);
  const ranges = await rangesOf(db, [
    ...items.flatMap((item) => item.personId ?? []),
    ...waiting.map((w) => w.personId),
  ]);
  const rangeOf = (personId: string): SingerOnDay["range"] => {
    const best = ranges.get(personId)?.best;
    return best ? { low: best.low, high: best.high, kind: best.kind } : null;
  };
  const subject = { companyId: scope.companyId, productionId: scope.id };
  return {
    id: day.id,
    productionId: scope.id,
    localDate: day.localDate,
    zone: day.zone,
    version: day.version,
    slotMinutes: day.slotMinutes,
    restAfterMinutes: day.restAfterMinutes,
    restMinutes: day.restMinutes,
    lunchMinutes: day.lunchMinutes,
    lunchFrom: day.lunchFrom,
    lunchTo: day.lunchTo,
    hold: items.some((item) => item.kind === "hold"),
    doorLink: links.length > 0,
    rooms: held.map((room) => ({
      id: room.id,
      roomId: room.roomId,
      name: room.name,
      venue: room.venue,
      opensAt: room.opensAt.toISOString(),
      closesAt: room.closesAt.toISOString(),
      items: items
        .filter((item) => item.auditionRoomId === room.id)
        .map((item) => ({
          id: item.id,
          kind: item.kind,
          startsAt: item.startsAt.toISOString(),
          endsAt: item.endsAt.toISOString(),
          singer: singerOf(item, rangeOf),
        })),
      pianists: sessions
        .filter((session) => session.auditionRoomId === room.id)
        .map((session) => ({
          id: session.id,
          personId: session.personId,
          name: session.name,
          startsAt: session.startsAt.toISOString(),
          endsAt: session.endsAt.toISOString(),
        })),
    })),
    waiting: waiting.map(({ place: _, ...row }) => ({
      ...row,
      attendance: null,
      range: rangeOf(row.personId),
    })),
    may: {
      plan: can(actor, "auditions:plan", subject),
      assign: can(actor, "pianists:assign", subject),
      hear: can(actor, "range:hear", subject),
      door: can(actor, "door:run", subject),
    },
  };
}

async function listItems(dayId: string, roomIds: string[]) {
  if (roomIds.length === 0) return [];
  return db
    .select({
      id: slots.id,
      auditionRoomId: slots.auditionRoomId,
      kind: slots.kind,
      startsAt: slots.startsAt,
      endsAt: slots.endsAt,
      signUpId: signUps.id,
      signUpVersion: signUps.version,
      personId: people.id,
      name: people.name,
      pronouns: people.pronouns,
      minor: people.minor,
      state: signUps.state,
      song: signUps.song,
      bars: signUps.bars,
      asksFor: signUps.asksFor,
      notBefore: signUps.notBefore,
      notAfter: signUps.notAfter,
      hereAt: attendances.hereAt,
      inAt: attendances.inAt,
      outAt: attendances.outAt,
    })
    .from(slots)
    .leftJoin(slotAssignments, eq(slotAssignments.slotId, slots.id))
    .leftJoin(signUps, eq(signUps.id, slotAssignments.signUpId))
    .leftJoin(people, eq(people.id, signUps.personId))
    .leftJoin(attendances, and(eq(attendances.signUpId, signUps.id), eq(attendances.dayId, dayId)))
    .where(inArray(slots.auditionRoomId, roomIds))
    .orderBy(asc(slots.startsAt));
}

type Item = Awaited<ReturnType<typeof listItems>>[number];

function singerOf(
  item: Item,
  rangeOf: (personId: string) => SingerOnDay["range"],
): SingerOnDay | null {
  if (item.signUpId === null || item.personId === null || item.name === null || item.state === null)
    return null;
  return {
    signUpId: item.signUpId,
    version: item.signUpVersion ?? 1,
    personId: item.personId,
    name: item.name,
    pronouns: item.pronouns,
    minor: item.minor ?? false,
    state: item.state,
    song: item.song,
    bars: item.bars,
    asksFor: item.asksFor,
    notBefore: item.notBefore,
    notAfter: item.notAfter,
    range: rangeOf(item.personId),
    attendance:
      item.outAt !== null
        ? "out"
        : item.inAt !== null
          ? "in"
          : item.hereAt !== null
            ? "here"
            : null,
  };
}
