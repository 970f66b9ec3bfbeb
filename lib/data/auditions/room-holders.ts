import "server-only";
import { aliasedTable, and, asc, eq, gt, lt, ne, or, isNull } from "drizzle-orm";
import { db } from "@/db/client";
import {
  auditionDays,
  auditionRooms,
  callbackRounds,
  calls,
  productions,
  roomBookings,
  rooms,
} from "@/db/schema";
import { AppError } from "@/lib/errors";
import { clockSpan } from "@/lib/format-dates";
import type { RoomLaidOut } from "@/lib/auditions/lay-out-day";

/**
 * Who holds one of these rooms in its time, as a refusal that says who, when and what to do. The rooms belong to one
 * company, so that its productions may know of each other. `dayId`: the day that asks, whose own bookings do not count.
 */
export async function roomTaken(
  wanted: readonly RoomLaidOut[],
  zone: string,
  dayId: string | null,
): Promise<AppError> {
  const callProductions = aliasedTable(productions, "call_productions");
  const roundProductions = aliasedTable(productions, "round_productions");
  for (const room of wanted) {
    const [held] = await db
      .select({
        room: rooms.name,
        startsAt: roomBookings.startsAt,
        endsAt: roomBookings.endsAt,
        auditions: productions.title,
        call: callProductions.title,
        round: roundProductions.title,
      })
      .from(roomBookings)
      .innerJoin(rooms, eq(rooms.id, roomBookings.roomId))
      .leftJoin(auditionRooms, eq(auditionRooms.id, roomBookings.auditionRoomId))
      .leftJoin(auditionDays, eq(auditionDays.id, auditionRooms.dayId))
      .leftJoin(productions, eq(productions.id, auditionDays.productionId))
      .leftJoin(calls, eq(calls.id, roomBookings.callId))
      .leftJoin(callProductions, eq(callProductions.id, calls.productionId))
      .leftJoin(callbackRounds, eq(callbackRounds.id, roomBookings.callbackRoundId))
      .leftJoin(roundProductions, eq(roundProductions.id, callbackRounds.productionId))
      .where(
        and(
          eq(roomBookings.roomId, room.roomId),
          lt(roomBookings.startsAt, room.closesAt),
          gt(roomBookings.endsAt, room.opensAt),
          dayId === null
            ? undefined
            : or(isNull(auditionRooms.dayId), ne(auditionRooms.dayId, dayId)),
        ),
      )
      .orderBy(asc(roomBookings.startsAt))
      .limit(1);
    if (!held) continue;
    const holder =
      held.call !== null
        ? `a call of ${held.call}`
        : held.round !== null
          ? `the callbacks of ${held.round}`
          : `the auditions of ${held.auditions ?? "another production"}`;
    return new AppError(
      "taken",
      `${held.room} is taken by ${holder}, ${clockSpan(held.startsAt, held.endsAt, zone)}. Choose another room, or times outside that.`,
    );
  }
  return new AppError(
    "taken",
    "One of the rooms was taken a moment ago. Load the page again and choose another room or other times.",
  );
}
