import "server-only";
import { aliasedTable, and, asc, eq, gt, isNull, lt, ne, or } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import type { Tx } from "@/db/client";
import { newId } from "@/db/columns";
import {
  auditionDays,
  auditionRooms,
  calls,
  companies,
  people,
  pianistSessions,
  positions,
  productions,
  rooms,
} from "@/db/schema";
import { AppError } from "@/lib/errors";
import { clock, clockSpan } from "@/lib/format-dates";
import type { Actor } from "@/lib/permissions/types";
import { overlaps } from "@/lib/schedule/overlaps";
import { toInstant } from "@/lib/schedule/to-instant";
import type { assignPianistSchema, removePianistSchema } from "@/lib/schemas/auditions";
import { recordAudit } from "../audit";
import { productionFor } from "../guard";
import { duplicateKey, inTransaction } from "../transaction";

/** Who can be asked to play: the production's accompanists. */
export async function listAccompanists(
  actor: Actor,
  productionId: string,
): Promise<{ personId: string; name: string }[]> {
  const scope = await productionFor(actor, productionId, "auditions:read");
  return db
    .select({ personId: people.id, name: people.name })
    .from(positions)
    .innerJoin(people, eq(people.id, positions.personId))
    .where(
      and(
        eq(positions.productionId, scope.id),
        eq(positions.kind, "accompanist"),
        isNull(positions.endedAt),
        isNull(people.removedAt),
      ),
    )
    .orderBy(asc(people.name));
}

/**
 * Has an accompanist play in a room of an audition day for a stretch of it. Returns the session's id. Throws `taken`
 * with where and when the pianist or the room's piano is taken (another company's business stays "engaged elsewhere").
 */
export async function assignPianist(
  actor: Actor,
  input: z.output<typeof assignPianistSchema>,
): Promise<string> {
  const scope = await productionFor(actor, input.productionId, "pianists:assign");
  const room = await roomOfDay(scope.id, input.auditionRoomId);
  const startsAt = toInstant(room.localDate, input.from, room.zone).instant;
  const endsAt = toInstant(room.localDate, input.to, room.zone).instant;
  if (startsAt < room.opensAt || endsAt > room.closesAt || startsAt >= endsAt) {
    const message = `${room.name} is open ${clockSpan(room.opensAt, room.closesAt, room.zone)}. Choose times inside that.`;
    throw new AppError("invalid", undefined, { fields: { from: message } });
  }
  const [pianist] = await db
    .select({ id: people.id, name: people.name, userId: people.userId })
    .from(people)
    .innerJoin(
      positions,
      and(
        eq(positions.personId, people.id),
        eq(positions.productionId, scope.id),
        eq(positions.kind, "accompanist"),
        isNull(positions.endedAt),
      ),
    )
    .where(
      and(
        eq(people.id, input.personId),
        eq(people.companyId, scope.companyId),
        isNull(people.removedAt),
      ),
    );
  if (!pianist)
    throw new AppError(
      "not-found",
      "That person is not an accompanist of this production any more. Choose another.",
    );
  const bookeeId = pianist.userId ?? pianist.id;
  const sessionId = newId();
  try {
    await inTransaction(async (tx) => {
      await assertPianoFree(tx, room, { from: startsAt, to: endsAt });
      await tx.insert(pianistSessions).values({
        id: sessionId,
        productionId: scope.id,
        personId: pianist.id,
        bookeeId,
        auditionRoomId: room.id,
        startsAt,
        endsAt,
      });
      await recordAudit(tx, actor, {
        companyId: scope.companyId,
        productionId: scope.id,
        action: "pianist.assign",
        subjectKind: "person",
        subjectId: pianist.id,
        summary: `${pianist.name} plays in ${room.name}, ${clockSpan(startsAt, endsAt, room.zone)}`,
      });
    });
  } catch (error) {
    if (duplicateKey(error) !== "pianist_sessions_held") throw error;
    throw await pianistTaken(
      { bookeeId, name: pianist.name, startsAt, endsAt },
      scope.companyId,
      room.zone,
    );
  }
  return sessionId;
}

async function roomOfDay(productionId: string, auditionRoomId: string) {
  const [room] = await db
    .select({
      id: auditionRooms.id,
      name: rooms.name,
      opensAt: auditionRooms.opensAt,
      closesAt: auditionRooms.closesAt,
      localDate: auditionDays.localDate,
      zone: auditionDays.zone,
    })
    .from(auditionRooms)
    .innerJoin(auditionDays, eq(auditionDays.id, auditionRooms.dayId))
    .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
    .where(
      and(
        eq(auditionRooms.id, auditionRoomId),
        eq(auditionDays.productionId, productionId),
        isNull(auditionDays.removedAt),
      ),
    );
  if (!room)
    throw new AppError(
      "not-found",
      "That room is not part of the day any more. Load the day again.",
    );
  return room;
}

/** One pianist at a time at one piano: the room is locked, so that two assignments cannot pass each other. */
async function assertPianoFree(
  tx: Tx,
  room: { id: string; name: string; zone: string },
  wanted: { from: Date; to: Date },
): Promise<void> {
  await tx
    .select({ id: auditionRooms.id })
    .from(auditionRooms)
    .where(eq(auditionRooms.id, room.id))
    .for("update");
  const sessions = await tx
    .select({ name: people.name, from: pianistSessions.startsAt, to: pianistSessions.endsAt })
    .from(pianistSessions)
    .innerJoin(people, eq(people.id, pianistSessions.personId))
    .where(eq(pianistSessions.auditionRoomId, room.id));
  const sitting = sessions.find((session) => overlaps(session, wanted));
  if (!sitting) return;
  throw new AppError(
    "taken",
    `${sitting.name} plays in ${room.name} ${clockSpan(sitting.from, sitting.to, room.zone)}. Choose times outside that, or take that pianist out first.`,
  );
}

/** Why a pianist cannot be had: where and when within the company, only "engaged elsewhere" beyond it. */
export async function pianistTaken(
  wanted: {
    bookeeId: string;
    name: string;
    startsAt: Date;
    endsAt: Date;
    /** The call that asks: what it holds itself is in nobody's way. */
    exceptCallId?: string;
  },
  companyId: string,
  zone: string,
): Promise<AppError> {
  const callRooms = aliasedTable(rooms, "call_rooms");
  const [held] = await db
    .select({
      startsAt: pianistSessions.startsAt,
      endsAt: pianistSessions.endsAt,
      companyId: companies.id,
      production: productions.title,
      room: rooms.name,
      callRoom: callRooms.name,
    })
    .from(pianistSessions)
    .innerJoin(productions, eq(productions.id, pianistSessions.productionId))
    .innerJoin(companies, eq(companies.id, productions.companyId))
    .leftJoin(auditionRooms, eq(auditionRooms.id, pianistSessions.auditionRoomId))
    .leftJoin(rooms, eq(rooms.id, auditionRooms.roomId))
    .leftJoin(calls, eq(calls.id, pianistSessions.callId))
    .leftJoin(callRooms, eq(callRooms.id, calls.roomId))
    .where(
      and(
        eq(pianistSessions.bookeeId, wanted.bookeeId),
        lt(pianistSessions.startsAt, wanted.endsAt),
        gt(pianistSessions.endsAt, wanted.startsAt),
        wanted.exceptCallId === undefined
          ? undefined
          : or(isNull(pianistSessions.callId), ne(pianistSessions.callId, wanted.exceptCallId)),
      ),
    )
    .orderBy(asc(pianistSessions.startsAt))
    .limit(1);
  if (!held)
    return new AppError("stale", `${wanted.name} was taken a moment ago. Load the page again.`);
  const span = clockSpan(held.startsAt, held.endsAt, zone);
  const room = held.room ?? held.callRoom;
  const where =
    held.companyId === companyId
      ? `plays for ${held.production}${room === null ? "" : ` in ${room}`}, ${span}`
      : `is engaged elsewhere, ${span}`;
  return new AppError(
    "taken",
    `${wanted.name} ${where}. Choose another pianist, or times outside that (before ${clock(held.startsAt, zone)} or from ${clock(held.endsAt, zone)}).`,
  );
}

/** Takes a pianist out of an audition room; they are free again. */
export async function removePianist(
  actor: Actor,
  input: z.output<typeof removePianistSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "pianists:assign");
  await inTransaction(async (tx) => {
    const [session] = await tx
      .select({
        id: pianistSessions.id,
        personId: people.id,
        name: people.name,
        auditionRoomId: pianistSessions.auditionRoomId,
      })
      .from(pianistSessions)
      .innerJoin(people, eq(people.id, pianistSessions.personId))
      .where(
        and(eq(pianistSessions.id, input.sessionId), eq(pianistSessions.productionId, scope.id)),
      );
    if (!session || session.auditionRoomId === null)
      throw new AppError("not-found", "That pianist is not there any more. Load the day again.");
    await tx.delete(pianistSessions).where(eq(pianistSessions.id, session.id));
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "pianist.remove",
      subjectKind: "person",
      subjectId: session.personId,
      summary: `Took ${session.name} out of an audition room`,
    });
  });
}
