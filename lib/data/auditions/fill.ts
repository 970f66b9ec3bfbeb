import "server-only";
import { and, asc, eq, isNull } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import type { Db, Tx } from "@/db/client";
import { auditionRooms, rooms, slotAssignments, slots } from "@/db/schema";
import { planFill } from "@/lib/auditions/plan-fill";
import { AppError } from "@/lib/errors";
import { clock, longDay } from "@/lib/format-dates";
import type { Actor } from "@/lib/permissions/types";
import { toInstant } from "@/lib/schedule/to-instant";
import type { acceptFillSchema, daySchema } from "@/lib/schemas/auditions";
import { recordAudit } from "../audit";
import { productionFor } from "../guard";
import { duplicateKey, inTransaction } from "../transaction";
import { lockSignUps } from "./place";
import { dayOf, lockDay } from "./scope";
import { listWaiting } from "./waiting";

export type FillProposal = {
  placements: { signUpId: string; name: string; slotId: string; time: string; room: string }[];
  /** Who cannot be placed, and why, in words. */
  unplaced: { signUpId: string; name: string; why: string }[];
};

async function freeSlots(tx: Db | Tx, dayId: string) {
  return tx
    .select({ slotId: slots.id, startsAt: slots.startsAt, endsAt: slots.endsAt, room: rooms.name })
    .from(slots)
    .innerJoin(auditionRooms, eq(auditionRooms.id, slots.auditionRoomId))
    .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
    .leftJoin(slotAssignments, eq(slotAssignments.slotId, slots.id))
    .where(
      and(eq(auditionRooms.dayId, dayId), eq(slots.kind, "slot"), isNull(slotAssignments.signUpId)),
    )
    .orderBy(asc(rooms.name), asc(slots.startsAt));
}

const asked = (from: string | null, to: string | null): string =>
  from !== null && to !== null
    ? `between ${from} and ${to}`
    : from !== null
      ? `after ${from}`
      : `before ${to ?? ""}`;

/**
 * Proposes a slot for everyone who waits: as many as can be, everyone within the times they asked for, holds left free.
 * Writes nothing. `now` is the clock: slots that have begun are not offered.
 */
export async function proposeFill(
  actor: Actor,
  input: z.output<typeof daySchema>,
  now = new Date(),
): Promise<FillProposal> {
  const scope = await productionFor(actor, input.productionId, "auditions:plan");
  const day = await dayOf(db, scope.id, input.dayId);
  const [free, waiting] = await Promise.all([freeSlots(db, day.id), listWaiting(db, scope.id)]);
  const roomNames = [...new Set(free.map((slot) => slot.room))];
  const at = (time: string | null): Date | null =>
    time === null ? null : toInstant(day.localDate, time, day.zone).instant;
  const plan = planFill(
    free
      .filter((slot) => slot.startsAt >= now)
      .map((slot) => ({ ...slot, roomPlace: roomNames.indexOf(slot.room) })),
    waiting.map((singer) => ({
      signUpId: singer.signUpId,
      place: singer.place,
      notBefore: at(singer.notBefore),
      notAfter: at(singer.notAfter),
    })),
  );
  const slotById = new Map(free.map((slot) => [slot.slotId, slot]));
  const singerById = new Map(waiting.map((singer) => [singer.signUpId, singer]));
  return {
    placements: plan.placements.flatMap(({ signUpId, slotId }) => {
      const slot = slotById.get(slotId);
      const singer = singerById.get(signUpId);
      return slot && singer
        ? [
            {
              signUpId,
              name: singer.name,
              slotId,
              time: clock(slot.startsAt, day.zone),
              room: slot.room,
            },
          ]
        : [];
    }),
    unplaced: plan.unplaced.flatMap(({ signUpId, reason }) => {
      const singer = singerById.get(signUpId);
      if (!singer) return [];
      const limited = singer.notBefore !== null || singer.notAfter !== null;
      const times = asked(singer.notBefore, singer.notAfter);
      const why =
        reason === "outside"
          ? limited && free.length > 0
            ? `Asked for ${times}: no free slot lies there.`
            : "No free slot is left on this day."
          : limited
            ? `Asked for ${times}: the free slots there go to others who can come at no other time, or signed up earlier.`
            : "No free slot is left: others who signed up earlier or asked for certain times come first.";
      return [{ signUpId, name: singer.name, why }];
    }),
  };
}

/** Writes a proposal that was accepted, whole or not at all. Throws `stale` when the day changed since. */
export async function acceptFill(
  actor: Actor,
  input: z.output<typeof acceptFillSchema>,
): Promise<number> {
  const scope = await productionFor(actor, input.productionId, "auditions:plan");
  const changed = (): AppError =>
    new AppError(
      "stale",
      "The day changed while you looked: one of these slots or singers is placed now. Ask for a new proposal.",
    );
  try {
    return await inTransaction(async (tx) => {
      const day = await lockDay(tx, scope.id, input.dayId);
      const signUpIds = input.placements.map((p) => p.signUpId);
      await lockSignUps(tx, scope.id, signUpIds);
      const free = await freeSlots(tx, day.id);
      const waiting = new Set((await listWaiting(tx, scope.id)).map((singer) => singer.signUpId));
      const freeIds = new Set(free.map((slot) => slot.slotId));
      if (input.placements.some((p) => !freeIds.has(p.slotId) || !waiting.has(p.signUpId)))
        throw changed();
      await tx
        .insert(slotAssignments)
        .values(input.placements.map((p) => ({ ...p, dayId: day.id })));
      await recordAudit(tx, actor, {
        companyId: scope.companyId,
        productionId: scope.id,
        action: "slot.fill",
        subjectKind: "audition_day",
        subjectId: day.id,
        summary: `Placed ${String(input.placements.length)} singers on ${longDay(day.localDate, scope.locale)}`,
      });
      return input.placements.length;
    });
  } catch (error) {
    if (duplicateKey(error) !== null) throw changed();
    throw error;
  }
}
