import "server-only";
import { and, asc, eq, inArray, isNull, sql } from "drizzle-orm";
import { db } from "@/db/client";
import {
  auditionDays,
  auditionRooms,
  companies,
  people,
  productions,
  rooms,
  signUps,
  slotAssignments,
  slots,
  venues,
} from "@/db/schema";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";
import { recordAudit } from "../audit";
import { inTransaction } from "../transaction";

/** Singers are asked to be there this long before their slot (common practice, no source). */
const EARLY_MINUTES = 15;

export type OwnSlot = {
  signUpId: string;
  slotId: string;
  productionId: string;
  production: string;
  company: string;
  localDate: string;
  zone: string;
  startsAt: Date;
  endsAt: Date;
  beThereAt: Date;
  room: string;
  venue: string;
  address: string;
  song: string | null;
  state: "invited" | "confirmed" | "declined";
};

/** The sign-ups that are the actor's own, in productions where they still are an actor. */
function ownSignUps(actor: Actor) {
  const own = actor.positions.filter((p) => p.kind === "actor" && p.productionId !== null);
  return own.length === 0
    ? null
    : and(
        inArray(
          signUps.personId,
          own.map((p) => p.personId),
        ),
        inArray(
          signUps.productionId,
          own.flatMap((p) => p.productionId ?? []),
        ),
      );
}

/** The actor's own audition times, in order. A slot that nobody has invited them to yet is only a plan, and not shown. */
export async function listOwnSlots(actor: Actor): Promise<OwnSlot[]> {
  const own = ownSignUps(actor);
  if (!own) return [];
  const rows = await db
    .select({
      signUpId: signUps.id,
      slotId: slots.id,
      productionId: productions.id,
      production: productions.title,
      company: companies.name,
      localDate: auditionDays.localDate,
      zone: auditionDays.zone,
      startsAt: slots.startsAt,
      endsAt: slots.endsAt,
      room: rooms.name,
      venue: venues.name,
      address: venues.address,
      song: signUps.song,
      state: signUps.state,
    })
    .from(signUps)
    .innerJoin(slotAssignments, eq(slotAssignments.signUpId, signUps.id))
    .innerJoin(slots, eq(slots.id, slotAssignments.slotId))
    .innerJoin(auditionRooms, eq(auditionRooms.id, slots.auditionRoomId))
    .innerJoin(auditionDays, eq(auditionDays.id, auditionRooms.dayId))
    .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
    .innerJoin(venues, eq(venues.id, rooms.venueId))
    .innerJoin(productions, eq(productions.id, signUps.productionId))
    .innerJoin(companies, eq(companies.id, productions.companyId))
    .where(
      and(
        own,
        isNull(auditionDays.removedAt),
        isNull(productions.removedAt),
        inArray(signUps.state, ["invited", "confirmed", "declined"]),
      ),
    )
    .orderBy(asc(slots.startsAt));
  return rows.flatMap(({ state, ...row }) =>
    state === "invited" || state === "confirmed" || state === "declined"
      ? [{ ...row, state, beThereAt: new Date(row.startsAt.getTime() - EARLY_MINUTES * 60_000) }]
      : [],
  );
}

/**
 * A singer confirms or declines their own time; until it begins the answer can be changed. `slotId`, where the page gives
 * it, is the slot the singer saw. Throws `not-found` for a sign-up that is not theirs, `stale` when the time was changed.
 */
export async function answerSlot(
  actor: Actor,
  input: { signUpId: string; answer: "confirm" | "decline"; slotId?: string | undefined },
  now = new Date(),
): Promise<void> {
  const own = ownSignUps(actor);
  if (!own) throw new AppError("not-found");
  await inTransaction(async (tx) => {
    const [row] = await tx
      .select({
        id: signUps.id,
        state: signUps.state,
        productionId: signUps.productionId,
        companyId: people.companyId,
        name: people.name,
        slotId: slotAssignments.slotId,
        startsAt: slots.startsAt,
      })
      .from(signUps)
      .innerJoin(people, eq(people.id, signUps.personId))
      .innerJoin(slotAssignments, eq(slotAssignments.signUpId, signUps.id))
      .innerJoin(slots, eq(slots.id, slotAssignments.slotId))
      .where(and(eq(signUps.id, input.signUpId), own))
      .for("update");
    if (!row || row.state === "listed" || row.state === "withdrawn")
      throw new AppError("not-found");
    if (input.slotId !== undefined && input.slotId !== row.slotId) {
      throw new AppError(
        "stale",
        "Your time was changed a moment ago. Load the page again and answer the new one.",
      );
    }
    if (row.startsAt <= now)
      throw new AppError("refused", "This time has begun. Speak to the company directly.");
    const state = input.answer === "confirm" ? "confirmed" : "declined";
    await tx
      .update(signUps)
      .set({ state, answeredAt: now, version: sql`${signUps.version} + 1` })
      .where(eq(signUps.id, row.id));
    await recordAudit(tx, actor, {
      companyId: row.companyId,
      productionId: row.productionId,
      action: "sign-up.answer",
      subjectKind: "sign_up",
      subjectId: row.id,
      summary: `${row.name} ${state} their audition time`,
    });
  });
}
