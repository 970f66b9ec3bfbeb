import "server-only";
import { and, asc, eq, max, sql } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import type { Tx } from "@/db/client";
import { newId } from "@/db/columns";
import {
  auditionDays,
  auditionRooms,
  people,
  productions,
  ranges,
  rooms,
  signUps,
  slotAssignments,
  slots,
} from "@/db/schema";
import type { SignUpState } from "@/lib/auditions/day-view";
import { AppError } from "@/lib/errors";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import type {
  addSingerSchema,
  changeSignUpSchema,
  SingerRowValues,
  signUpSchema,
} from "@/lib/schemas/auditions";
import { recordAudit } from "../audit";
import { productionFor } from "../guard";
import type { ProductionScope } from "../guard";
import { ensurePosition, findOrCreatePerson } from "../people";
import { rangesOf } from "../ranges";
import { duplicateKey, inTransaction } from "../transaction";
import { lockSignUps } from "./place";

export type SignUpListed = {
  id: string;
  version: number;
  personId: string;
  name: string;
  pronouns: string | null;
  minor: boolean;
  state: SignUpState;
  place: number;
  song: string | null;
  bars: number | null;
  asksFor: string | null;
  notBefore: string | null;
  notAfter: string | null;
  range: { low: number; high: number; kind: "claimed" | "heard" } | null;
  slot: { dayId: string; localDate: string; zone: string; startsAt: Date; room: string } | null;
  /** Null when there is none, or when the reader may not see contacts. */
  email: string | null;
};

/** Everyone signed up for the production's auditions, in the order they were taken. */
export async function listSignUps(actor: Actor, productionId: string): Promise<SignUpListed[]> {
  const scope = await productionFor(actor, productionId, "auditions:read");
  const contacts = can(actor, "contacts:read", {
    companyId: scope.companyId,
    productionId: scope.id,
  });
  const rows = await db
    .select({
      id: signUps.id,
      version: signUps.version,
      personId: people.id,
      name: people.name,
      pronouns: people.pronouns,
      minor: people.minor,
      email: people.email,
      state: signUps.state,
      place: signUps.place,
      song: signUps.song,
      bars: signUps.bars,
      asksFor: signUps.asksFor,
      notBefore: signUps.notBefore,
      notAfter: signUps.notAfter,
      dayId: auditionDays.id,
      localDate: auditionDays.localDate,
      zone: auditionDays.zone,
      startsAt: slots.startsAt,
      room: rooms.name,
    })
    .from(signUps)
    .innerJoin(people, eq(people.id, signUps.personId))
    .leftJoin(slotAssignments, eq(slotAssignments.signUpId, signUps.id))
    .leftJoin(slots, eq(slots.id, slotAssignments.slotId))
    .leftJoin(auditionRooms, eq(auditionRooms.id, slots.auditionRoomId))
    .leftJoin(auditionDays, eq(auditionDays.id, auditionRooms.dayId))
    .leftJoin(rooms, eq(rooms.id, auditionRooms.roomId))
    .where(eq(signUps.productionId, scope.id))
    .orderBy(asc(signUps.place));
  const onFile = await rangesOf(
    db,
    rows.map((row) => row.personId),
  );
  return rows.map(({ dayId, localDate, zone, startsAt, room, email, ...row }) => {
    const best = onFile.get(row.personId)?.best;
    return {
      ...row,
      email: contacts ? email : null,
      range: best ? { low: best.low, high: best.high, kind: best.kind } : null,
      slot:
        dayId !== null && localDate !== null && zone !== null && startsAt !== null && room !== null
          ? { dayId, localDate, zone, startsAt, room }
          : null,
    };
  });
}

/** The next place in the order of sign-ups; locks the production, so that no two get the same. */
export async function nextPlace(tx: Tx, productionId: string): Promise<number> {
  await tx
    .select({ id: productions.id })
    .from(productions)
    .where(eq(productions.id, productionId))
    .for("update");
  const [row] = await tx
    .select({ place: max(signUps.place) })
    .from(signUps)
    .where(eq(signUps.productionId, productionId));
  return (row?.place ?? 0) + 1;
}

export type Taken = { signUpId: string; personId: string; newPerson: boolean; already: boolean };

/**
 * Signs one singer up at this place: the company's record of them (found by address, or made), their position as actor,
 * the sign-up, and the range they claim unless they have given one themselves. Someone signed up before is left as they are.
 */
export async function takeSignUp(
  tx: Tx,
  actor: Actor,
  scope: ProductionScope,
  row: SingerRowValues,
  place: number,
): Promise<Taken> {
  const person = await findOrCreatePerson(tx, scope.companyId, row);
  const [known] = await tx
    .select({ id: signUps.id })
    .from(signUps)
    .where(and(eq(signUps.productionId, scope.id), eq(signUps.personId, person.id)));
  if (known) return { signUpId: known.id, personId: person.id, newPerson: false, already: true };
  await ensurePosition(tx, {
    companyId: scope.companyId,
    productionId: scope.id,
    personId: person.id,
    kind: "actor",
  });
  const signUpId = newId();
  await tx.insert(signUps).values({
    id: signUpId,
    productionId: scope.id,
    personId: person.id,
    place,
    song: row.song,
    bars: row.bars,
    asksFor: row.asksFor,
    notBefore: row.notBefore,
    notAfter: row.notAfter,
  });
  if (row.low !== null && row.high !== null) {
    const claimed = person.created
      ? null
      : (await rangesOf(tx, [person.id])).get(person.id)?.claimed;
    if (!claimed) {
      await tx.insert(ranges).values({
        id: newId(),
        personId: person.id,
        kind: "claimed",
        low: row.low,
        high: row.high,
        givenBy: actor.userId,
      });
    }
  }
  return { signUpId, personId: person.id, newPerson: person.created, already: false };
}

/** Signs one singer up by hand. Throws `taken` when they are on the list. */
export async function addSinger(
  actor: Actor,
  input: z.output<typeof addSingerSchema>,
): Promise<string> {
  const scope = await productionFor(actor, input.productionId, "auditions:plan");
  try {
    return await inTransaction(async (tx) => {
      const place = await nextPlace(tx, scope.id);
      const taken = await takeSignUp(tx, actor, scope, input, place);
      if (taken.already) {
        const message = "This person is signed up already. Look for them in the list.";
        throw new AppError("taken", undefined, { fields: { email: message } });
      }
      await recordAudit(tx, actor, {
        companyId: scope.companyId,
        productionId: scope.id,
        action: "sign-up.add",
        subjectKind: "sign_up",
        subjectId: taken.signUpId,
        summary: `Signed up ${input.name}`,
      });
      return taken.signUpId;
    });
  } catch (error) {
    if (duplicateKey(error) !== null)
      throw new AppError(
        "stale",
        "Someone signed this person up at the same moment. Load the list again.",
      );
    throw error;
  }
}

/** Changes what a singer brings and asks for. Throws `stale` when someone else changed it since `version` was read. */
export async function changeSignUp(
  actor: Actor,
  input: z.output<typeof changeSignUpSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "sign-up:change");
  await inTransaction(async (tx) => {
    const [singer] = await lockSignUps(tx, scope.id, [input.signUpId]);
    if (!singer) throw new AppError("not-found");
    const [result] = await tx
      .update(signUps)
      .set({
        song: input.song,
        bars: input.bars,
        asksFor: input.asksFor,
        notBefore: input.notBefore,
        notAfter: input.notAfter,
        version: sql`${signUps.version} + 1`,
      })
      .where(
        and(
          eq(signUps.id, singer.id),
          eq(signUps.productionId, scope.id),
          eq(signUps.version, input.version),
        ),
      );
    if (result.affectedRows === 0) throw new AppError("stale");
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "sign-up.change",
      subjectKind: "sign_up",
      subjectId: singer.id,
      summary: `Changed the sign-up of ${singer.name}`,
    });
  });
}

/** The singer does not come: their slot is free again. */
export async function withdrawSignUp(
  actor: Actor,
  input: z.output<typeof signUpSchema>,
): Promise<void> {
  await setStanding(actor, input, "withdrawn");
}

/** Puts someone who withdrew or said no back on the list, without a slot unless they still hold one. */
export async function relistSignUp(
  actor: Actor,
  input: z.output<typeof signUpSchema>,
): Promise<void> {
  await setStanding(actor, input, "listed");
}

async function setStanding(
  actor: Actor,
  input: z.output<typeof signUpSchema>,
  state: "withdrawn" | "listed",
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "sign-up:change");
  await inTransaction(async (tx) => {
    const [singer] = await lockSignUps(tx, scope.id, [input.signUpId]);
    if (!singer) throw new AppError("not-found");
    if (state === "listed" && singer.state !== "withdrawn" && singer.state !== "declined") {
      throw new AppError("stale", `${singer.name} is on the list already.`);
    }
    if (state === "withdrawn")
      await tx.delete(slotAssignments).where(eq(slotAssignments.signUpId, singer.id));
    await tx
      .update(signUps)
      .set({ state, invitedAt: null, answeredAt: null, version: sql`${signUps.version} + 1` })
      .where(and(eq(signUps.id, singer.id), eq(signUps.productionId, scope.id)));
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: state === "withdrawn" ? "sign-up.withdraw" : "sign-up.relist",
      subjectKind: "sign_up",
      subjectId: singer.id,
      summary:
        state === "withdrawn"
          ? `${singer.name} withdrew from the auditions`
          : `Put ${singer.name} back on the list`,
    });
  });
}
