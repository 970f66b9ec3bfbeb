import "server-only";
import { and, asc, desc, eq, isNull, sql } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import type { Tx } from "@/db/client";
import { newId } from "@/db/columns";
import {
  callbackMarks,
  callbackRounds,
  people,
  productions,
  roles,
  rooms,
  signUps,
} from "@/db/schema";
import { recordAudit } from "@/lib/data/audit";
import { fitWords } from "@/lib/data/casting/fit-words";
import type { FitWords } from "@/lib/data/casting/fit-words";
import { productionFor } from "@/lib/data/guard";
import type { ProductionScope } from "@/lib/data/guard";
import { rangesOf } from "@/lib/data/ranges";
import type { RangeOnFile } from "@/lib/data/ranges";
import { roleVoicesIn } from "@/lib/data/score/voices";
import { inTransaction } from "@/lib/data/transaction";
import { AppError } from "@/lib/errors";
import { groupBy } from "@/lib/group-by";
import type { PitchSpan } from "@/lib/music/types";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import { toInstant } from "@/lib/schedule/to-instant";
import type { changeRoundSchema, markSchema, startRoundSchema } from "@/lib/schemas/callbacks";
import { latestRound } from "./round";
import type { Round } from "./round";
import { compareWithSent, countChanges, standingInvitations, wantedSnapshots } from "./standing";
import type { PublishedCount, Unsent } from "./standing";

export type CallbackSinger = {
  personId: string;
  name: string;
  minor: boolean;
  song: string | null;
  asksFor: string | null;
  /** Withdrew from the auditions; listed only while a mark or something sent still stands. */
  withdrawn: boolean;
  range: Omit<RangeOnFile, "at"> | null;
  /** The verdict on each role, in the order of the roles. */
  fits: FitWords[];
  /** Roles this singer is marked for. */
  marks: string[];
  /** What they were last sent of this round and still stands, with their answer. */
  sent: { answer: "yes" | "no" | null } | null;
  /** What publishing now would change for them. */
  unsent: Unsent;
};

export type CallbackDraft = {
  round: Round | null;
  roles: { id: string; name: string; line: PitchSpan | null }[];
  singers: CallbackSinger[];
  may: { mark: boolean; publish: boolean };
  mayHear: boolean;
  /** What publishing now would do, for who may. */
  preview: PublishedCount | null;
};

/** The latest round of the production with its draft marks, the fits and what was published. The draft is for the music team, the table and the stage manager. */
export async function readCallbacks(actor: Actor, productionId: string): Promise<CallbackDraft> {
  const scope = await productionFor(actor, productionId, "callbacks:read");
  const subject = { companyId: scope.companyId, productionId: scope.id };
  const [round, voices, signedUp] = await Promise.all([
    latestRound(scope.id),
    roleVoicesIn(db, scope.id),
    db
      .select({
        personId: people.id,
        name: people.name,
        minor: people.minor,
        song: signUps.song,
        asksFor: signUps.asksFor,
        state: signUps.state,
      })
      .from(signUps)
      .innerJoin(people, eq(people.id, signUps.personId))
      .where(and(eq(signUps.productionId, scope.id), isNull(people.removedAt)))
      .orderBy(asc(signUps.place)),
  ]);
  const [ranges, marks, standing, wanted] = await Promise.all([
    rangesOf(
      db,
      signedUp.map((row) => row.personId),
    ),
    round
      ? db
          .select({ personId: callbackMarks.personId, roleId: callbackMarks.roleId })
          .from(callbackMarks)
          .where(eq(callbackMarks.roundId, round.id))
      : [],
    round ? standingInvitations(db, round.id) : [],
    round ? wantedSnapshots(db, scope.id, round) : new Map<string, never>(),
  ]);
  const changes = compareWithSent(wanted, standing);
  const marksOf = groupBy(marks, (mark) => mark.personId);
  const may = {
    mark: can(actor, "callbacks:draft", subject),
    publish: can(actor, "callbacks:publish", subject),
  };
  return {
    round,
    roles: voices.map(({ id, name, line }) => ({
      id,
      name,
      line: line && { low: line.low, high: line.high },
    })),
    singers: signedUp
      .filter(
        (row) =>
          row.state !== "withdrawn" || marksOf.has(row.personId) || changes.has(row.personId),
      )
      .map(({ state, ...row }) => {
        const best = ranges.get(row.personId)?.best ?? null;
        const sent = standing.find((s) => s.personId === row.personId);
        return {
          ...row,
          withdrawn: state === "withdrawn",
          range: best && {
            low: best.low,
            high: best.high,
            comfortableLow: best.comfortableLow,
            comfortableHigh: best.comfortableHigh,
            kind: best.kind,
          },
          fits: voices.map((role) => fitWords(best, role.line)),
          marks: (marksOf.get(row.personId) ?? []).map((m) => m.roleId),
          sent: sent ? { answer: sent.answer } : null,
          unsent: changes.get(row.personId) ?? "none",
        };
      }),
    may,
    mayHear: can(actor, "range:hear", subject),
    preview: may.publish ? countChanges(changes) : null,
  };
}

/** Begins a round. One round at a time is drafted; a new one may begin when the last is published. */
export async function startRound(
  actor: Actor,
  input: z.output<typeof startRoundSchema>,
): Promise<string> {
  const scope = await productionFor(actor, input.productionId, "callbacks:publish");
  const id = newId();
  await inTransaction(async (tx) => {
    // Two who begin at once come through here one after the other.
    await tx
      .select({ id: productions.id })
      .from(productions)
      .where(eq(productions.id, scope.id))
      .for("update");
    const [last] = await tx
      .select({ issue: callbackRounds.issue })
      .from(callbackRounds)
      .where(eq(callbackRounds.productionId, scope.id))
      .orderBy(desc(callbackRounds.id))
      .limit(1)
      .for("update");
    if (last?.issue === 0)
      throw new AppError(
        "refused",
        "There is a round that has not been published yet. Finish that one first.",
      );
    await tx
      .insert(callbackRounds)
      .values({ id, productionId: scope.id, title: input.title, zone: scope.zone });
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "callbacks.start",
      subjectKind: "round",
      subjectId: id,
      summary: `Began the round ${input.title}`,
    });
  });
  return id;
}

/** Sets when and where the round is and what to prepare. Nothing goes out until it is published. */
export async function changeRound(
  actor: Actor,
  input: z.output<typeof changeRoundSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "callbacks:publish");
  if (input.roomId !== null) await roomOfCompany(scope, input.roomId);
  const [result] = await db
    .update(callbackRounds)
    .set({
      startsAt: toInstant(input.localDate, input.from, scope.zone).instant,
      endsAt: toInstant(input.localDate, input.to, scope.zone).instant,
      roomId: input.roomId,
      material: input.material,
      version: sql`${callbackRounds.version} + 1`,
    })
    .where(
      and(
        eq(callbackRounds.id, input.roundId),
        eq(callbackRounds.productionId, scope.id),
        eq(callbackRounds.version, input.version),
      ),
    );
  if (result.affectedRows === 0) await refuseStale(scope.id, input.roundId);
}

/** Marks a singer to be called back for a role, or takes the mark away. Doing it twice is doing it once. */
export async function setMark(actor: Actor, input: z.output<typeof markSchema>): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "callbacks:draft");
  await inTransaction(async (tx) => {
    await assertMarkable(tx, scope, input);
    if (input.on) {
      await tx
        .insert(callbackMarks)
        .values({ roundId: input.roundId, personId: input.personId, roleId: input.roleId })
        .onDuplicateKeyUpdate({ set: { roleId: input.roleId } });
    } else {
      await tx
        .delete(callbackMarks)
        .where(
          and(
            eq(callbackMarks.roundId, input.roundId),
            eq(callbackMarks.personId, input.personId),
            eq(callbackMarks.roleId, input.roleId),
          ),
        );
    }
  });
}

async function assertMarkable(
  tx: Tx,
  scope: ProductionScope,
  input: z.output<typeof markSchema>,
): Promise<void> {
  const [round] = await tx
    .select({ id: callbackRounds.id })
    .from(callbackRounds)
    .where(and(eq(callbackRounds.id, input.roundId), eq(callbackRounds.productionId, scope.id)));
  const [role] = await tx
    .select({ id: roles.id })
    .from(roles)
    .where(
      and(eq(roles.id, input.roleId), eq(roles.productionId, scope.id), isNull(roles.removedAt)),
    );
  const [singer] = await tx
    .select({ id: signUps.id })
    .from(signUps)
    .where(and(eq(signUps.personId, input.personId), eq(signUps.productionId, scope.id)));
  if (!round || !role || !singer) throw new AppError("not-found");
}

async function roomOfCompany(scope: ProductionScope, roomId: string): Promise<void> {
  const [room] = await db
    .select({ id: rooms.id })
    .from(rooms)
    .where(and(eq(rooms.id, roomId), eq(rooms.companyId, scope.companyId)));
  if (!room) throw new AppError("not-found", "That room is no longer there. Choose another.");
}

async function refuseStale(productionId: string, roundId: string): Promise<never> {
  const [round] = await db
    .select({ id: callbackRounds.id })
    .from(callbackRounds)
    .where(and(eq(callbackRounds.id, roundId), eq(callbackRounds.productionId, productionId)));
  throw new AppError(round ? "stale" : "not-found");
}
