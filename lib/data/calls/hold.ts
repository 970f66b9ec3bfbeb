import "server-only";
import { and, eq, isNull } from "drizzle-orm";
import { db } from "@/db/client";
import type { Tx } from "@/db/client";
import { calls, people, pianistSessions, positions, roomBookings, rooms, users } from "@/db/schema";
import { pianistTaken } from "@/lib/data/auditions/pianists";
import type { ProductionScope } from "@/lib/data/guard";
import { duplicateKey } from "@/lib/data/transaction";
import { AppError } from "@/lib/errors";
import { clockSpan } from "@/lib/format-dates";
import { overlaps } from "@/lib/schedule/overlaps";
import { readRoomHolders } from "./room-holders";

export type Holding = {
  callId: string;
  roomId: string | null;
  pianistId: string | null;
  startsAt: Date;
  endsAt: Date;
};

/** The call's row, locked for the transaction. Throws `not-found` for another production's, `stale` when it was changed since. */
export async function lockCall(tx: Tx, productionId: string, callId: string, version: number) {
  const [call] = await tx
    .select({
      id: calls.id,
      state: calls.state,
      version: calls.version,
      startsAt: calls.startsAt,
      endsAt: calls.endsAt,
      roomId: calls.roomId,
      leaderId: calls.leaderId,
      pianistId: calls.pianistId,
      localDate: calls.localDate,
      kind: calls.kind,
    })
    .from(calls)
    .where(and(eq(calls.id, callId), eq(calls.productionId, productionId)))
    .for("update");
  if (!call) throw new AppError("not-found");
  if (call.version !== version) throw new AppError("stale");
  return call;
}

/**
 * Takes the room and the pianist of a published call, instead of what it held before. The room's and the login's rows are
 * locked first, so that many at once wait instead of meeting; the database's own keys refuse what is taken.
 */
export async function holdForCall(tx: Tx, productionId: string, wanted: Holding): Promise<void> {
  const { callId, roomId, pianistId, startsAt, endsAt } = wanted;
  if (roomId !== null)
    await tx.select({ id: rooms.id }).from(rooms).where(eq(rooms.id, roomId)).for("update");
  const bookeeId = pianistId === null ? null : await lockBookee(tx, productionId, pianistId);
  await tx.delete(roomBookings).where(eq(roomBookings.callId, callId));
  if (roomId !== null) await tx.insert(roomBookings).values({ roomId, startsAt, endsAt, callId });
  const [held] = await tx
    .select({
      personId: pianistSessions.personId,
      startsAt: pianistSessions.startsAt,
      endsAt: pianistSessions.endsAt,
    })
    .from(pianistSessions)
    .where(eq(pianistSessions.callId, callId));
  const same =
    held?.personId === pianistId &&
    held.startsAt.getTime() === startsAt.getTime() &&
    held.endsAt.getTime() === endsAt.getTime();
  // A session the pianist has confirmed stays confirmed when nothing about it changes.
  if (held && same) return;
  await tx.delete(pianistSessions).where(eq(pianistSessions.callId, callId));
  if (pianistId === null || bookeeId === null) return;
  await tx
    .insert(pianistSessions)
    .values({ productionId, personId: pianistId, bookeeId, callId, startsAt, endsAt });
}

/** Frees the room and the pianist of a call. */
export async function freeOfCall(tx: Tx, callId: string): Promise<void> {
  await tx.delete(roomBookings).where(eq(roomBookings.callId, callId));
  await tx.delete(pianistSessions).where(eq(pianistSessions.callId, callId));
}

async function lockBookee(tx: Tx, productionId: string, personId: string): Promise<string> {
  const [person] = await tx
    .select({ id: people.id, userId: people.userId })
    .from(people)
    .innerJoin(
      positions,
      and(
        eq(positions.personId, people.id),
        eq(positions.productionId, productionId),
        isNull(positions.endedAt),
      ),
    )
    .where(eq(people.id, personId))
    .limit(1);
  if (!person)
    throw new AppError(
      "refused",
      "The pianist has no position in this production any more. Choose another.",
    );
  if (person.userId === null)
    await tx.select({ id: people.id }).from(people).where(eq(people.id, person.id)).for("update");
  else
    await tx.select({ id: users.id }).from(users).where(eq(users.id, person.userId)).for("update");
  return person.userId ?? person.id;
}

/** Runs the work; a room or pianist that is taken becomes a refusal that says by what, when, and what to do. */
export async function orTaken<T>(
  scope: ProductionScope,
  wanted: Holding,
  work: () => Promise<T>,
): Promise<T> {
  try {
    return await work();
  } catch (error) {
    const key = duplicateKey(error);
    if (key === "room_bookings_held") throw await roomTaken(scope, wanted);
    if (key !== "pianist_sessions_held" || wanted.pianistId === null) throw error;
    const [person] = await db
      .select({ name: people.name, userId: people.userId })
      .from(people)
      .where(eq(people.id, wanted.pianistId));
    throw await pianistTaken(
      {
        bookeeId: person?.userId ?? wanted.pianistId,
        name: person?.name ?? "The pianist",
        startsAt: wanted.startsAt,
        endsAt: wanted.endsAt,
        exceptCallId: wanted.callId,
      },
      scope.companyId,
      scope.zone,
    );
  }
}

async function roomTaken(scope: ProductionScope, wanted: Holding): Promise<AppError> {
  const time = { from: wanted.startsAt, to: wanted.endsAt };
  const holders = await readRoomHolders(scope.companyId, time);
  const [room] = await db
    .select({ name: rooms.name })
    .from(rooms)
    .where(eq(rooms.id, wanted.roomId ?? ""));
  const name = room?.name ?? "The room";
  const holder = holders.find(
    (held) =>
      held.roomId === wanted.roomId && held.callId !== wanted.callId && overlaps(held, time),
  );
  if (!holder)
    return new AppError(
      "taken",
      `${name} was taken a moment ago. Load the page again and choose another room or time.`,
    );
  return new AppError(
    "taken",
    `${name} is taken by ${holder.label}, ${clockSpan(holder.from, holder.to, scope.zone)}. Choose another room, or a time outside that.`,
  );
}
