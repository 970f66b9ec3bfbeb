import "server-only";
import { and, asc, desc, eq, inArray, isNull, ne, sql } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import type { Tx } from "@/db/client";
import { newId } from "@/db/columns";
import { callbackInvitations, callbackMarks, callbackRounds, people, roles, rooms, signUps, venues } from "@/db/schema";
import { recordAudit } from "@/lib/data/audit";
import { productionFor } from "@/lib/data/guard";
import type { ProductionScope } from "@/lib/data/guard";
import { rangesOf } from "@/lib/data/ranges";
import type { RangeOnFile } from "@/lib/data/ranges";
import { inTransaction } from "@/lib/data/transaction";
import { AppError } from "@/lib/errors";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import { toInstant } from "@/lib/schedule/to-instant";
import type { changeRoundSchema, markSchema, startRoundSchema } from "@/lib/schemas/callbacks";

export type Round = {
  id: string;
  title: string;
  startsAt: Date | null;
  endsAt: Date | null;
  zone: string;
  roomId: string | null;
  room: string | null;
  material: string | null;
  issue: number;
  publishedAt: Date | null;
  version: number;
};

export type CallbackSinger = {
  personId: string;
  name: string;
  minor: boolean;
  song: string | null;
  asksFor: string | null;
  range: RangeOnFile | null;
  /** Roles this singer is marked for. */
  marks: string[];
  /** What was last published to them. */
  sent: { issue: number; answer: "yes" | "no" | null } | null;
};

export type CallbackDraft = {
  round: Round | null;
  roles: { id: string; name: string }[];
  singers: CallbackSinger[];
  may: { mark: boolean; publish: boolean };
};

/** The latest round of the production with its draft marks and what was published. The draft is for the music team, the table and the stage manager. */
export async function readCallbacks(actor: Actor, productionId: string): Promise<CallbackDraft> {
  const scope = await productionFor(actor, productionId, "callbacks:read");
  const subject = { companyId: scope.companyId, productionId: scope.id };
  const [round, roleRows, singerRows] = await Promise.all([
    latestRound(scope.id),
    db.select({ id: roles.id, name: roles.name }).from(roles).where(and(eq(roles.productionId, scope.id), isNull(roles.removedAt))).orderBy(asc(roles.place)),
    db
      .select({ personId: people.id, name: people.name, minor: people.minor, song: signUps.song, asksFor: signUps.asksFor })
      .from(signUps)
      .innerJoin(people, eq(people.id, signUps.personId))
      .where(and(eq(signUps.productionId, scope.id), ne(signUps.state, "withdrawn"), isNull(people.removedAt)))
      .orderBy(asc(signUps.place)),
  ]);
  const ids = singerRows.map((row) => row.personId);
  const [ranges, marks, sent] = await Promise.all([
    rangesOf(db, ids),
    round ? db.select({ personId: callbackMarks.personId, roleId: callbackMarks.roleId }).from(callbackMarks).where(eq(callbackMarks.roundId, round.id)) : [],
    round
      ? db
          .select({ personId: callbackInvitations.personId, issue: callbackInvitations.issue, answer: callbackInvitations.answer })
          .from(callbackInvitations)
          .where(and(eq(callbackInvitations.roundId, round.id), isNull(callbackInvitations.supersededAt)))
      : [],
  ]);
  return {
    round,
    roles: roleRows,
    singers: singerRows.map((row) => {
      const last = sent.find((s) => s.personId === row.personId);
      return {
        ...row,
        range: ranges.get(row.personId)?.best ?? null,
        marks: marks.filter((m) => m.personId === row.personId).map((m) => m.roleId),
        sent: last ? { issue: last.issue, answer: last.answer } : null,
      };
    }),
    may: { mark: can(actor, "callbacks:draft", subject), publish: can(actor, "callbacks:publish", subject) },
  };
}

/** Begins a round. One round at a time is drafted; a new one may begin when the last is published. */
export async function startRound(actor: Actor, input: z.output<typeof startRoundSchema>): Promise<string> {
  const scope = await productionFor(actor, input.productionId, "callbacks:publish");
  const last = await latestRound(scope.id);
  if (last && last.issue === 0) throw new AppError("refused", "There is a round that has not been published yet. Finish that one first.");
  const id = newId();
  await inTransaction(async (tx) => {
    await tx.insert(callbackRounds).values({ id, productionId: scope.id, title: input.title, zone: scope.zone });
    await recordAudit(tx, actor, { companyId: scope.companyId, productionId: scope.id, action: "callbacks.start", subjectKind: "round", subjectId: id, summary: `Began the round ${input.title}` });
  });
  return id;
}

/** Sets when and where the round is and what to prepare. Nothing goes out until it is published. */
export async function changeRound(actor: Actor, input: z.output<typeof changeRoundSchema>): Promise<void> {
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
    .where(and(eq(callbackRounds.id, input.roundId), eq(callbackRounds.productionId, scope.id), eq(callbackRounds.version, input.version)));
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
        .where(and(eq(callbackMarks.roundId, input.roundId), eq(callbackMarks.personId, input.personId), eq(callbackMarks.roleId, input.roleId)));
    }
  });
}

async function assertMarkable(tx: Tx, scope: ProductionScope, input: z.output<typeof markSchema>): Promise<void> {
  const [round] = await tx.select({ id: callbackRounds.id }).from(callbackRounds).where(and(eq(callbackRounds.id, input.roundId), eq(callbackRounds.productionId, scope.id)));
  const [role] = await tx.select({ id: roles.id }).from(roles).where(and(eq(roles.id, input.roleId), eq(roles.productionId, scope.id), isNull(roles.removedAt)));
  const [singer] = await tx.select({ id: signUps.id }).from(signUps).where(and(eq(signUps.personId, input.personId), eq(signUps.productionId, scope.id)));
  if (!round || !role || !singer) throw new AppError("not-found");
}

/** The newest round of a production. Asks no permission: the caller has. */
export async function latestRound(productionId: string): Promise<Round | null> {
  const [row] = await db
    .select({
      id: callbackRounds.id,
      title: callbackRounds.title,
      startsAt: callbackRounds.startsAt,
      endsAt: callbackRounds.endsAt,
      zone: callbackRounds.zone,
      roomId: callbackRounds.roomId,
      roomName: rooms.name,
      venueName: venues.name,
      material: callbackRounds.material,
      issue: callbackRounds.issue,
      publishedAt: callbackRounds.publishedAt,
      version: callbackRounds.version,
    })
    .from(callbackRounds)
    .leftJoin(rooms, eq(rooms.id, callbackRounds.roomId))
    .leftJoin(venues, eq(venues.id, rooms.venueId))
    .where(eq(callbackRounds.productionId, productionId))
    .orderBy(desc(callbackRounds.id))
    .limit(1);
  if (!row) return null;
  const { roomName, venueName, ...round } = row;
  return { ...round, room: roomName === null ? null : `${roomName}, ${venueName ?? ""}` };
}

async function roomOfCompany(scope: ProductionScope, roomId: string): Promise<void> {
  const [room] = await db.select({ id: rooms.id }).from(rooms).where(and(eq(rooms.id, roomId), eq(rooms.companyId, scope.companyId)));
  if (!room) throw new AppError("not-found", "That room is no longer there. Choose another.");
}

async function refuseStale(productionId: string, roundId: string): Promise<never> {
  const [round] = await db.select({ id: callbackRounds.id }).from(callbackRounds).where(and(eq(callbackRounds.id, roundId), inArray(callbackRounds.productionId, [productionId])));
  throw new AppError(round ? "stale" : "not-found");
}
