import "server-only";
import { aliasedTable, and, asc, eq, gt, lt } from "drizzle-orm";
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
import { CALL_PHRASES } from "@/lib/calls/call-kinds";
import type { HeldRoom } from "@/lib/calls/types";
import type { Interval } from "@/lib/schedule/types";

/** Who holds which room of a company in a time. Rooms are the company's, so its productions may know of each other. */
export async function readRoomHolders(companyId: string, window: Interval): Promise<HeldRoom[]> {
  const ofCall = aliasedTable(productions, "of_call");
  const ofRound = aliasedTable(productions, "of_round");
  const rows = await db
    .select({
      roomId: roomBookings.roomId,
      callId: roomBookings.callId,
      from: roomBookings.startsAt,
      to: roomBookings.endsAt,
      auditions: productions.title,
      call: ofCall.title,
      callKind: calls.kind,
      round: ofRound.title,
    })
    .from(roomBookings)
    .innerJoin(rooms, eq(rooms.id, roomBookings.roomId))
    .leftJoin(auditionRooms, eq(auditionRooms.id, roomBookings.auditionRoomId))
    .leftJoin(auditionDays, eq(auditionDays.id, auditionRooms.dayId))
    .leftJoin(productions, eq(productions.id, auditionDays.productionId))
    .leftJoin(calls, eq(calls.id, roomBookings.callId))
    .leftJoin(ofCall, eq(ofCall.id, calls.productionId))
    .leftJoin(callbackRounds, eq(callbackRounds.id, roomBookings.callbackRoundId))
    .leftJoin(ofRound, eq(ofRound.id, callbackRounds.productionId))
    .where(
      and(
        eq(rooms.companyId, companyId),
        lt(roomBookings.startsAt, window.to),
        gt(roomBookings.endsAt, window.from),
      ),
    )
    .orderBy(asc(roomBookings.startsAt));
  return rows.map(({ roomId, callId, from, to, auditions, call, callKind, round }) => {
    if (call !== null && callKind !== null)
      return { roomId, callId, from, to, label: `${CALL_PHRASES[callKind]} of ${call}` };
    const label =
      round === null
        ? `the auditions of ${auditions ?? "another production"}`
        : `the callbacks of ${round}`;
    return { roomId, callId, from, to, label };
  });
}
