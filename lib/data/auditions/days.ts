import "server-only";
import { and, asc, eq, inArray, isNull, sql } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import type { Tx } from "@/db/client";
import { newId } from "@/db/columns";
import {
  auditionDays,
  auditionRooms,
  dayLinks,
  pianistSessions,
  productions,
  roomBookings,
  rooms,
  signUps,
  slotAssignments,
  slots,
  venues,
} from "@/db/schema";
import { layOutDay } from "@/lib/auditions/lay-out-day";
import type { DayPlan, RoomLaidOut } from "@/lib/auditions/lay-out-day";
import { AppError } from "@/lib/errors";
import { longDay } from "@/lib/format-dates";
import type { Actor } from "@/lib/permissions/types";
import type { createDaySchema, daySchema } from "@/lib/schemas/auditions";
import { recordAudit } from "../audit";
import { productionFor } from "../guard";
import { duplicateKey, inTransaction } from "../transaction";
import { roomTaken } from "./room-holders";
import { dayOf, lockDay } from "./scope";

export type DayListed = {
  id: string;
  localDate: string;
  zone: string;
  slotMinutes: number;
  rooms: { name: string; opensAt: Date; closesAt: Date }[];
  slots: number;
  placed: number;
};

/** The production's audition days in order, with how many slots they have and how many are filled. */
export async function listDays(actor: Actor, productionId: string): Promise<DayListed[]> {
  const scope = await productionFor(actor, productionId, "auditions:read");
  const days = await db
    .select({
      id: auditionDays.id,
      localDate: auditionDays.localDate,
      zone: auditionDays.zone,
      slotMinutes: auditionDays.slotMinutes,
    })
    .from(auditionDays)
    .where(and(eq(auditionDays.productionId, scope.id), isNull(auditionDays.removedAt)))
    .orderBy(asc(auditionDays.localDate));
  if (days.length === 0) return [];
  const ids = days.map((day) => day.id);
  const [held, counts] = await Promise.all([
    db
      .select({
        dayId: auditionRooms.dayId,
        name: rooms.name,
        opensAt: auditionRooms.opensAt,
        closesAt: auditionRooms.closesAt,
      })
      .from(auditionRooms)
      .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
      .where(inArray(auditionRooms.dayId, ids))
      .orderBy(asc(auditionRooms.opensAt), asc(rooms.name)),
    db
      .select({
        dayId: auditionRooms.dayId,
        slots: sql<number>`count(*)`.mapWith(Number),
        placed: sql<number>`count(${slotAssignments.slotId})`.mapWith(Number),
      })
      .from(slots)
      .innerJoin(auditionRooms, eq(auditionRooms.id, slots.auditionRoomId))
      .leftJoin(slotAssignments, eq(slotAssignments.slotId, slots.id))
      .where(and(inArray(auditionRooms.dayId, ids), inArray(slots.kind, ["slot", "hold"])))
      .groupBy(auditionRooms.dayId),
  ]);
  return days.map((day) => {
    const count = counts.find((row) => row.dayId === day.id);
    return {
      ...day,
      rooms: held
        .filter((row) => row.dayId === day.id)
        .map(({ name, opensAt, closesAt }) => ({ name, opensAt, closesAt })),
      slots: count?.slots ?? 0,
      placed: count?.placed ?? 0,
    };
  });
}

export type DayChoices = {
  zone: string;
  locale: string;
  rooms: { id: string; name: string; venue: string; hasPiano: boolean }[];
};

/** What a day can be made of: the company's rooms and its clock. */
export async function listDayChoices(actor: Actor, productionId: string): Promise<DayChoices> {
  const scope = await productionFor(actor, productionId, "auditions:plan");
  const found = await db
    .select({ id: rooms.id, name: rooms.name, venue: venues.name, hasPiano: rooms.hasPiano })
    .from(rooms)
    .innerJoin(venues, eq(venues.id, rooms.venueId))
    .where(eq(rooms.companyId, scope.companyId))
    .orderBy(asc(venues.name), asc(rooms.name));
  return { zone: scope.zone, locale: scope.locale, rooms: found };
}

/** Throws unless every room is one of the company's. */
export async function assertRooms(
  tx: Tx,
  companyId: string,
  wanted: readonly RoomLaidOut[],
): Promise<void> {
  const found = await tx
    .select({ id: rooms.id })
    .from(rooms)
    .where(
      and(
        eq(rooms.companyId, companyId),
        inArray(
          rooms.id,
          wanted.map((room) => room.roomId),
        ),
      ),
    );
  if (found.length !== wanted.length)
    throw new AppError("not-found", "One of the rooms is not there any more. Load the page again.");
}

/** The day laid out, or a refusal beside the rooms that says what to change. */
export function laidOut(plan: DayPlan, zone: string): RoomLaidOut[] {
  const result = layOutDay(plan, zone);
  if (!result.ok) throw new AppError("invalid", undefined, { fields: { rooms: result.message } });
  return result.rooms;
}

/** One room of a day with its booking and its slots. Returns the audition room's id. */
export async function insertRoom(tx: Tx, dayId: string, room: RoomLaidOut): Promise<string> {
  const auditionRoomId = newId();
  await tx.insert(auditionRooms).values({
    id: auditionRoomId,
    dayId,
    roomId: room.roomId,
    opensAt: room.opensAt,
    closesAt: room.closesAt,
  });
  await tx
    .insert(roomBookings)
    .values({ roomId: room.roomId, startsAt: room.opensAt, endsAt: room.closesAt, auditionRoomId });
  await insertSlots(tx, auditionRoomId, room);
  return auditionRoomId;
}

/** The slots, rests and lunch of a room, as laid out. */
export async function insertSlots(
  tx: Tx,
  auditionRoomId: string,
  room: RoomLaidOut,
): Promise<void> {
  await tx.insert(slots).values(
    room.items.map((item) => ({
      id: newId(),
      auditionRoomId,
      kind: item.kind,
      startsAt: item.from,
      endsAt: item.to,
    })),
  );
}

/** The day's columns from a plan. */
export function dayColumns(plan: DayPlan) {
  return {
    localDate: plan.localDate,
    slotMinutes: plan.slotMinutes,
    restAfterMinutes: plan.restAfterMinutes,
    restMinutes: plan.restMinutes,
    lunchMinutes: plan.lunchMinutes,
    lunchFrom: plan.lunchMinutes > 0 ? plan.lunchFrom : null,
    lunchTo: plan.lunchMinutes > 0 ? plan.lunchTo : null,
  };
}

/** Throws `taken` when the production has another day on this date. Locks the production, so that two cannot be made at once. */
export async function assertDateFree(
  tx: Tx,
  productionId: string,
  localDate: string,
  exceptDayId: string | null,
  locale: string,
): Promise<void> {
  await tx
    .select({ id: productions.id })
    .from(productions)
    .where(eq(productions.id, productionId))
    .for("update");
  const same = await tx
    .select({ id: auditionDays.id })
    .from(auditionDays)
    .where(
      and(
        eq(auditionDays.productionId, productionId),
        eq(auditionDays.localDate, localDate),
        isNull(auditionDays.removedAt),
      ),
    );
  if (same.some((day) => day.id !== exceptDayId)) {
    const message = `There is an audition day on ${longDay(localDate, locale)} already. Add the room to that day instead.`;
    throw new AppError("taken", undefined, { fields: { localDate: message } });
  }
}

/**
 * Makes an audition day in the company's zone, lays out its rooms and books them. Returns the day's id.
 * Throws `taken` with who has a room and when, or `invalid` when no slot fits.
 */
export async function createDay(
  actor: Actor,
  input: z.output<typeof createDaySchema>,
): Promise<string> {
  const scope = await productionFor(actor, input.productionId, "auditions:plan");
  const wanted = laidOut(input, scope.zone);
  const dayId = newId();
  try {
    await inTransaction(async (tx) => {
      await assertRooms(tx, scope.companyId, wanted);
      await assertDateFree(tx, scope.id, input.localDate, null, scope.locale);
      await tx
        .insert(auditionDays)
        .values({ id: dayId, productionId: scope.id, zone: scope.zone, ...dayColumns(input) });
      for (const room of wanted) await insertRoom(tx, dayId, room);
      await recordAudit(tx, actor, {
        companyId: scope.companyId,
        productionId: scope.id,
        action: "audition-day.create",
        subjectKind: "audition_day",
        subjectId: dayId,
        summary: `Made an audition day on ${longDay(input.localDate, scope.locale)}`,
      });
    });
  } catch (error) {
    if (duplicateKey(error) === "room_bookings_held")
      throw await roomTaken(wanted, scope.zone, null);
    throw error;
  }
  return dayId;
}

/** Removes a day: its rooms and pianists are free again, its singers are back on the waiting list, its door link ends. */
export async function removeDay(actor: Actor, input: z.output<typeof daySchema>): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "auditions:plan");
  await inTransaction(async (tx) => {
    const day = await lockDay(tx, scope.id, input.dayId);
    const roomIds = (
      await tx
        .select({ id: auditionRooms.id })
        .from(auditionRooms)
        .where(eq(auditionRooms.dayId, day.id))
    ).map((r) => r.id);
    const placed = await tx
      .select({ signUpId: slotAssignments.signUpId })
      .from(slotAssignments)
      .where(eq(slotAssignments.dayId, day.id));
    await tx.delete(slotAssignments).where(eq(slotAssignments.dayId, day.id));
    if (placed.length > 0)
      await backToListed(
        tx,
        placed.map((row) => row.signUpId),
      );
    if (roomIds.length > 0) {
      await tx.delete(pianistSessions).where(inArray(pianistSessions.auditionRoomId, roomIds));
      await tx.delete(roomBookings).where(inArray(roomBookings.auditionRoomId, roomIds));
    }
    await tx
      .update(dayLinks)
      .set({ revokedAt: new Date() })
      .where(and(eq(dayLinks.dayId, day.id), isNull(dayLinks.revokedAt)));
    await tx
      .update(auditionDays)
      .set({ removedAt: new Date(), version: sql`${auditionDays.version} + 1` })
      .where(eq(auditionDays.id, day.id));
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "audition-day.remove",
      subjectKind: "audition_day",
      subjectId: day.id,
      summary: `Removed the audition day on ${longDay(day.localDate, scope.locale)}; ${String(placed.length)} singers lost their slot`,
    });
  });
}

/** Singers who lost their slot wait as listed; who said no stays with that answer. */
export async function backToListed(tx: Tx, signUpIds: string[]): Promise<void> {
  await tx
    .update(signUps)
    .set({
      state: "listed",
      invitedAt: null,
      answeredAt: null,
      version: sql`${signUps.version} + 1`,
    })
    .where(and(inArray(signUps.id, signUpIds), inArray(signUps.state, ["invited", "confirmed"])));
}

/** Throws `not-found` unless the day is there and the actor may read the production's auditions. */
export async function assertDay(actor: Actor, productionId: string, dayId: string): Promise<void> {
  const scope = await productionFor(actor, productionId, "auditions:read");
  await dayOf(db, scope.id, dayId);
}
