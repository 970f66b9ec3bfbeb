import "server-only";
import { and, eq, isNull } from "drizzle-orm";
import type { Db, Tx } from "@/db/client";
import { auditionDays, auditionRooms, rooms, slots, venues } from "@/db/schema";
import { AppError } from "@/lib/errors";
import { clock, longDay } from "@/lib/format-dates";

export type DayRow = typeof auditionDays.$inferSelect;

/** The production's audition day. Throws `not-found` for a day that is removed or of another production. */
export async function dayOf(tx: Db | Tx, productionId: string, dayId: string): Promise<DayRow> {
  return found(await selectDay(tx, productionId, dayId));
}

/**
 * The same, locked until the transaction ends: whoever changes a day or who sings on it locks the day first, so that
 * laying it out anew, removing it and placing a singer cannot pass each other.
 */
export async function lockDay(tx: Tx, productionId: string, dayId: string): Promise<DayRow> {
  return found(await selectDay(tx, productionId, dayId).for("update"));
}

function selectDay(tx: Db | Tx, productionId: string, dayId: string) {
  return tx
    .select()
    .from(auditionDays)
    .where(
      and(
        eq(auditionDays.id, dayId),
        eq(auditionDays.productionId, productionId),
        isNull(auditionDays.removedAt),
      ),
    );
}

function found([day]: DayRow[]): DayRow {
  if (!day) throw new AppError("not-found");
  return day;
}

export type SlotRow = {
  id: string;
  dayId: string;
  kind: (typeof slots.$inferSelect)["kind"];
  startsAt: Date;
  endsAt: Date;
  zone: string;
  localDate: string;
  room: string;
  venue: string;
  address: string;
};

/** A slot of one of the production's days, with where and when it is, locked together with its day. Throws `not-found`. */
export async function lockSlot(tx: Tx, productionId: string, slotId: string): Promise<SlotRow> {
  const [slot] = await tx
    .select({
      id: slots.id,
      dayId: auditionDays.id,
      kind: slots.kind,
      startsAt: slots.startsAt,
      endsAt: slots.endsAt,
      zone: auditionDays.zone,
      localDate: auditionDays.localDate,
      room: rooms.name,
      venue: venues.name,
      address: venues.address,
    })
    .from(slots)
    .innerJoin(auditionRooms, eq(auditionRooms.id, slots.auditionRoomId))
    .innerJoin(auditionDays, eq(auditionDays.id, auditionRooms.dayId))
    .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
    .innerJoin(venues, eq(venues.id, rooms.venueId))
    .where(
      and(
        eq(slots.id, slotId),
        eq(auditionDays.productionId, productionId),
        isNull(auditionDays.removedAt),
      ),
    )
    .for("update");
  if (!slot)
    throw new AppError("not-found", "That slot is not there any more. Load the day again.");
  return slot;
}

/** "Saturday 20 March, 10:16", as a message says it. */
export function slotInWords(
  slot: Pick<SlotRow, "localDate" | "startsAt" | "zone">,
  locale: string,
): string {
  return `${longDay(slot.localDate, locale)}, ${clock(slot.startsAt, slot.zone)}`;
}

/** "Room 1, Lantern Street, 4 Quay Lane". */
export function placeInWords(slot: Pick<SlotRow, "room" | "venue" | "address">): string {
  return [slot.room, slot.venue, slot.address].filter((part) => part !== "").join(", ");
}
