import "server-only";
import { and, asc, eq, inArray, sql } from "drizzle-orm";
import type { z } from "zod";
import type { Tx } from "@/db/client";
import { people, positions, signUps, slotAssignments } from "@/db/schema";
import { env } from "@/lib/env";
import { AppError } from "@/lib/errors";
import { clock } from "@/lib/format-dates";
import type { Actor } from "@/lib/permissions/types";
import type { placeSingerSchema, signUpSchema, swapSingersSchema } from "@/lib/schemas/auditions";
import { recordAudit } from "../audit";
import { productionFor } from "../guard";
import type { ProductionScope } from "../guard";
import { makeInvitationLink } from "../invitations";
import { queueMail } from "../outbox";
import { duplicateKey, inTransaction } from "../transaction";
import { placeInWords, slotInWords, lockSlot } from "./scope";
import type { SlotRow } from "./scope";

type Locked = {
  id: string;
  personId: string;
  name: string;
  email: string | null;
  userId: string | null;
  state: (typeof signUps.$inferSelect)["state"];
  version: number;
};

/** The production's sign-ups with these ids, locked in the order of their ids. Throws `not-found` when one is not there. */
export async function lockSignUps(
  tx: Tx,
  productionId: string,
  signUpIds: readonly string[],
): Promise<Locked[]> {
  const ids = [...new Set(signUpIds)];
  const rows = await tx
    .select({
      id: signUps.id,
      personId: signUps.personId,
      name: people.name,
      email: people.email,
      userId: people.userId,
      state: signUps.state,
      version: signUps.version,
    })
    .from(signUps)
    .innerJoin(people, eq(people.id, signUps.personId))
    .where(and(eq(signUps.productionId, productionId), inArray(signUps.id, ids)))
    .orderBy(asc(signUps.id))
    .for("update");
  if (rows.length !== ids.length)
    throw new AppError("not-found", "That singer is not on the list any more. Load the day again.");
  return rows;
}

async function slotNow(tx: Tx, signUpId: string): Promise<string | null> {
  const [row] = await tx
    .select({ slotId: slotAssignments.slotId })
    .from(slotAssignments)
    .where(eq(slotAssignments.signUpId, signUpId));
  return row?.slotId ?? null;
}

function assertPlaceable(slot: SlotRow): void {
  if (slot.kind === "slot" || slot.kind === "hold") return;
  throw new AppError(
    "refused",
    `Nobody sings at ${clock(slot.startsAt, slot.zone)}: it is ${slot.kind === "lunch" ? "lunch" : "the pianist's rest"}. Choose a slot.`,
  );
}

/**
 * Puts a singer into a free slot, from the waiting list or from another slot. Whoever knew the old time is told the new
 * one, and has to confirm again. Throws `taken` (who sings there), `stale` (moved meanwhile) or `refused`.
 */
export async function placeSinger(
  actor: Actor,
  input: z.output<typeof placeSingerSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "auditions:plan");
  try {
    await inTransaction(async (tx) => {
      const slot = await lockSlot(tx, scope.id, input.slotId);
      assertPlaceable(slot);
      const [singer] = await lockSignUps(tx, scope.id, [input.signUpId]);
      if (!singer) throw new AppError("not-found");
      if (singer.state === "withdrawn") {
        throw new AppError(
          "refused",
          `${singer.name} has withdrawn. Put them back on the list first.`,
        );
      }
      const before = await slotNow(tx, singer.id);
      if (before === slot.id) return;
      if (before !== input.seenIn)
        throw new AppError(
          "stale",
          `${singer.name} was moved by someone else a moment ago. Look again.`,
        );
      const [sitting] = await tx
        .select({ name: people.name })
        .from(slotAssignments)
        .innerJoin(signUps, eq(signUps.id, slotAssignments.signUpId))
        .innerJoin(people, eq(people.id, signUps.personId))
        .where(eq(slotAssignments.slotId, slot.id));
      if (sitting) throw takenBy(sitting.name, slot);
      await tx.delete(slotAssignments).where(eq(slotAssignments.signUpId, singer.id));
      await tx
        .insert(slotAssignments)
        .values({ slotId: slot.id, signUpId: singer.id, dayId: slot.dayId });
      await afterMove(tx, actor, scope, singer, slot);
      await recordMove(
        tx,
        actor,
        scope,
        singer,
        `Placed ${singer.name} at ${slotInWords(slot, scope.locale)}`,
      );
    });
  } catch (error) {
    const key = duplicateKey(error);
    if (key === "PRIMARY")
      throw new AppError(
        "taken",
        "Someone else was put into that slot a moment ago. Choose another free slot.",
      );
    if (key === "slot_assignments_day") throw new AppError("stale");
    throw error;
  }
}

function takenBy(name: string, slot: SlotRow): AppError {
  return new AppError(
    "taken",
    `${name} sings at ${clock(slot.startsAt, slot.zone)} in ${slot.room}. Choose a free slot, or swap the two.`,
  );
}

/** Two singers change places. Throws `stale` when one of them is no longer where the person saw them. */
export async function swapSingers(
  actor: Actor,
  input: z.output<typeof swapSingersSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "auditions:plan");
  const pair = [input.first, input.second];
  if (input.first.signUpId === input.second.signUpId)
    throw new AppError("invalid", "Choose two singers to swap.");
  await inTransaction(async (tx) => {
    const toFirst = await lockSlot(tx, scope.id, input.first.slotId);
    const toSecond = await lockSlot(tx, scope.id, input.second.slotId);
    const singers = await lockSignUps(
      tx,
      scope.id,
      pair.map((p) => p.signUpId),
    );
    for (const { signUpId, slotId } of pair) {
      if ((await slotNow(tx, signUpId)) !== slotId)
        throw new AppError(
          "stale",
          "One of the two was moved by someone else a moment ago. Look again.",
        );
    }
    await tx.delete(slotAssignments).where(
      inArray(
        slotAssignments.signUpId,
        pair.map((p) => p.signUpId),
      ),
    );
    await tx.insert(slotAssignments).values([
      { slotId: toSecond.id, signUpId: input.first.signUpId, dayId: toSecond.dayId },
      { slotId: toFirst.id, signUpId: input.second.signUpId, dayId: toFirst.dayId },
    ]);
    for (const singer of singers) {
      await afterMove(
        tx,
        actor,
        scope,
        singer,
        singer.id === input.first.signUpId ? toSecond : toFirst,
      );
    }
    const [first] = singers;
    if (first)
      await recordMove(
        tx,
        actor,
        scope,
        first,
        `Swapped ${singers.map((singer) => singer.name).join(" and ")}`,
      );
  });
}

/** Takes a singer out of their slot; they wait again. Nobody is written to. */
export async function takeOut(actor: Actor, input: z.output<typeof signUpSchema>): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "auditions:plan");
  await inTransaction(async (tx) => {
    const [singer] = await lockSignUps(tx, scope.id, [input.signUpId]);
    if (!singer) throw new AppError("not-found");
    const [gone] = await tx.delete(slotAssignments).where(eq(slotAssignments.signUpId, singer.id));
    if (gone.affectedRows === 0)
      throw new AppError("stale", `${singer.name} has no slot any more. Look again.`);
    await tx
      .update(signUps)
      .set({
        ...(singer.state === "declined"
          ? {}
          : { state: "listed", invitedAt: null, answeredAt: null }),
        version: sql`${signUps.version} + 1`,
      })
      .where(eq(signUps.id, singer.id));
    await recordMove(tx, actor, scope, singer, `Took ${singer.name} out of their slot`);
  });
}

async function recordMove(
  tx: Tx,
  actor: Actor,
  scope: ProductionScope,
  singer: Locked,
  summary: string,
): Promise<void> {
  await recordAudit(tx, actor, {
    companyId: scope.companyId,
    productionId: scope.id,
    action: "slot.change",
    subjectKind: "sign_up",
    subjectId: singer.id,
    summary,
  });
}

/** A new time has to be confirmed anew by whoever knew the old one; whoever said no to the old one is asked again later. */
async function afterMove(
  tx: Tx,
  actor: Actor,
  scope: ProductionScope,
  singer: Locked,
  slot: SlotRow,
): Promise<void> {
  const told = singer.state === "invited" || singer.state === "confirmed";
  await tx
    .update(signUps)
    .set({
      state: told ? "invited" : "listed",
      answeredAt: null,
      version: sql`${signUps.version} + 1`,
    })
    .where(eq(signUps.id, singer.id));
  if (!told || singer.email === null) return;
  await queueMail(tx, {
    companyId: scope.companyId,
    to: singer.email,
    template: "audition-moved",
    data: {
      name: singer.name,
      production: scope.title,
      when: slotInWords(slot, scope.locale),
      where: placeInWords(slot),
      link: await answerLink(tx, actor, scope.id, singer),
    },
    // The version makes every move a message of its own, there and back again included.
    dedupeKey: `audition-moved:${singer.id}:${String(singer.version)}`,
  });
}

/** Where the singer answers: their own page, or for someone who has no login yet the invitation that gives them one. */
export async function answerLink(
  tx: Tx,
  actor: Pick<Actor, "userId">,
  productionId: string,
  singer: { personId: string; userId: string | null; email: string | null },
): Promise<string> {
  const [position] =
    singer.userId !== null || singer.email === null
      ? []
      : await tx
          .select({ id: positions.id })
          .from(positions)
          .where(
            and(
              eq(positions.personId, singer.personId),
              eq(positions.productionId, productionId),
              eq(positions.kind, "actor"),
              sql`${positions.endedAt} is null`,
            ),
          );
  if (!position || singer.email === null) return new URL("/me", env().AUTH_URL).toString();
  return makeInvitationLink(tx, actor, { positionId: position.id, email: singer.email, to: "/me" });
}
