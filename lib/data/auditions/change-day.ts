import "server-only";
import { and, asc, eq, inArray, sql } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import type { Tx } from "@/db/client";
import {
  auditionDays,
  auditionRooms,
  people,
  pianistSessions,
  roomBookings,
  rooms,
  signUps,
  slotAssignments,
  slots,
} from "@/db/schema";
import type { RoomLaidOut } from "@/lib/auditions/lay-out-day";
import { AppError } from "@/lib/errors";
import { clock, longDay } from "@/lib/format-dates";
import type { Actor } from "@/lib/permissions/types";
import type { changeDaySchema } from "@/lib/schemas/auditions";
import { recordAudit } from "../audit";
import { productionFor } from "../guard";
import { duplicateKey, inTransaction } from "../transaction";
import {
  assertDateFree,
  assertRooms,
  backToListed,
  dayColumns,
  insertRoom,
  insertSlots,
  laidOut,
} from "./days";
import { roomTaken } from "./room-holders";
import { dayOf } from "./scope";

export type SlotLost = {
  signUpId: string;
  name: string;
  state: (typeof signUps.$inferSelect)["state"];
  time: string;
  room: string;
};

/** Either saved, or not: then `lost` are the singers whose time no longer exists, to be agreed to once. */
export type DayChanged = { saved: boolean; lost: SlotLost[] };

type Placed = {
  signUpId: string;
  name: string;
  state: SlotLost["state"];
  roomId: string;
  room: string;
  startsAt: Date;
};

/**
 * Changes a day and lays it out anew. Whoever's room and starting time still exist keeps them; if others would lose
 * their slot and are not in `mayLose`, nothing is saved and they are returned. Pianists stay as long as their room is open.
 * Throws `stale`, `taken` (who has a room and when) or `invalid`.
 */
export async function changeDay(
  actor: Actor,
  input: z.output<typeof changeDaySchema>,
): Promise<DayChanged> {
  const scope = await productionFor(actor, input.productionId, "auditions:plan");
  const day = await dayOf(db, scope.id, input.dayId);
  const wanted = laidOut(input, day.zone);
  try {
    return await inTransaction(async (tx) => {
      const [version] = await tx
        .update(auditionDays)
        .set({ ...dayColumns(input), version: sql`${auditionDays.version} + 1` })
        .where(and(eq(auditionDays.id, day.id), eq(auditionDays.version, input.version)));
      if (version.affectedRows === 0) throw new AppError("stale");
      await assertRooms(tx, scope.companyId, wanted);
      await assertDateFree(tx, scope.id, input.localDate, day.id, scope.locale);

      const placed = await placedOn(tx, day.id);
      const lost = placed.filter((singer) => !stillThere(singer, wanted));
      if (lost.some((singer) => !input.mayLose.includes(singer.signUpId)))
        throw new WouldLose(lost);

      await tx.delete(slotAssignments).where(eq(slotAssignments.dayId, day.id));
      await rebuildRooms(tx, day.id, wanted);
      await placeAgain(
        tx,
        day.id,
        placed.filter((singer) => !lost.includes(singer)),
      );
      if (lost.length > 0)
        await backToListed(
          tx,
          lost.map((singer) => singer.signUpId),
        );
      await recordAudit(tx, actor, {
        companyId: scope.companyId,
        productionId: scope.id,
        action: "audition-day.change",
        subjectKind: "audition_day",
        subjectId: day.id,
        summary: `Changed the audition day on ${longDay(input.localDate, scope.locale)}; ${String(lost.length)} singers lost their slot`,
      });
      return { saved: true, lost: lost.map((singer) => inWords(singer, day.zone)) };
    });
  } catch (error) {
    if (error instanceof WouldLose)
      return { saved: false, lost: error.lost.map((singer) => inWords(singer, day.zone)) };
    if (duplicateKey(error) === "room_bookings_held")
      throw await roomTaken(wanted, day.zone, day.id);
    throw error;
  }
}

/** Ends the transaction with nothing written, since somebody has to be asked first. */
class WouldLose extends Error {
  readonly lost: Placed[];
  constructor(lost: Placed[]) {
    super("would lose a slot");
    this.lost = lost;
  }
}

const inWords = (singer: Placed, zone: string): SlotLost => ({
  signUpId: singer.signUpId,
  name: singer.name,
  state: singer.state,
  time: clock(singer.startsAt, zone),
  room: singer.room,
});

function stillThere(singer: Placed, wanted: readonly RoomLaidOut[]): boolean {
  const room = wanted.find((r) => r.roomId === singer.roomId);
  return (
    room?.items.some(
      (item) =>
        (item.kind === "slot" || item.kind === "hold") &&
        item.from.getTime() === singer.startsAt.getTime(),
    ) ?? false
  );
}

async function placedOn(tx: Tx, dayId: string): Promise<Placed[]> {
  return tx
    .select({
      signUpId: signUps.id,
      name: people.name,
      state: signUps.state,
      roomId: auditionRooms.roomId,
      room: rooms.name,
      startsAt: slots.startsAt,
    })
    .from(slotAssignments)
    .innerJoin(slots, eq(slots.id, slotAssignments.slotId))
    .innerJoin(auditionRooms, eq(auditionRooms.id, slots.auditionRoomId))
    .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
    .innerJoin(signUps, eq(signUps.id, slotAssignments.signUpId))
    .innerJoin(people, eq(people.id, signUps.personId))
    .where(eq(slotAssignments.dayId, dayId))
    .orderBy(asc(slots.startsAt))
    .for("update");
}

async function rebuildRooms(tx: Tx, dayId: string, wanted: readonly RoomLaidOut[]): Promise<void> {
  const now = await tx
    .select({ id: auditionRooms.id, roomId: auditionRooms.roomId })
    .from(auditionRooms)
    .where(eq(auditionRooms.dayId, dayId));
  const gone = now
    .filter((room) => !wanted.some((r) => r.roomId === room.roomId))
    .map((room) => room.id);
  if (gone.length > 0) {
    await tx.delete(pianistSessions).where(inArray(pianistSessions.auditionRoomId, gone));
    // Slots and bookings go with their audition room.
    await tx.delete(auditionRooms).where(inArray(auditionRooms.id, gone));
  }
  for (const room of wanted) {
    const kept = now.find((r) => r.roomId === room.roomId);
    if (!kept) {
      await insertRoom(tx, dayId, room);
      continue;
    }
    await tx
      .update(auditionRooms)
      .set({ opensAt: room.opensAt, closesAt: room.closesAt })
      .where(eq(auditionRooms.id, kept.id));
    await tx
      .update(roomBookings)
      .set({ startsAt: room.opensAt, endsAt: room.closesAt })
      .where(eq(roomBookings.auditionRoomId, kept.id));
    await tx.delete(slots).where(eq(slots.auditionRoomId, kept.id));
    await insertSlots(tx, kept.id, room);
    await trimPianists(tx, kept.id, room);
  }
}

/** A pianist is held no longer than the room is open; who would play in a closed room is free again. */
async function trimPianists(tx: Tx, auditionRoomId: string, room: RoomLaidOut): Promise<void> {
  const sessions = await tx
    .select({
      id: pianistSessions.id,
      startsAt: pianistSessions.startsAt,
      endsAt: pianistSessions.endsAt,
    })
    .from(pianistSessions)
    .where(eq(pianistSessions.auditionRoomId, auditionRoomId));
  for (const session of sessions) {
    const startsAt = session.startsAt > room.opensAt ? session.startsAt : room.opensAt;
    const endsAt = session.endsAt < room.closesAt ? session.endsAt : room.closesAt;
    if (startsAt >= endsAt)
      await tx.delete(pianistSessions).where(eq(pianistSessions.id, session.id));
    else
      await tx
        .update(pianistSessions)
        .set({ startsAt, endsAt })
        .where(eq(pianistSessions.id, session.id));
  }
}

async function placeAgain(tx: Tx, dayId: string, kept: readonly Placed[]): Promise<void> {
  if (kept.length === 0) return;
  const now = await tx
    .select({ id: slots.id, roomId: auditionRooms.roomId, startsAt: slots.startsAt })
    .from(slots)
    .innerJoin(auditionRooms, eq(auditionRooms.id, slots.auditionRoomId))
    .where(eq(auditionRooms.dayId, dayId));
  const slotAt = new Map(
    now.map((slot) => [`${slot.roomId} ${String(slot.startsAt.getTime())}`, slot.id]),
  );
  const values = kept.flatMap((singer) => {
    const slotId = slotAt.get(`${singer.roomId} ${String(singer.startsAt.getTime())}`);
    return slotId === undefined ? [] : [{ slotId, signUpId: singer.signUpId, dayId }];
  });
  await tx.insert(slotAssignments).values(values);
}
