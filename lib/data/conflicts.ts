import "server-only";
import { and, asc, eq, gte, inArray, isNull, sql } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import type { Tx } from "@/db/client";
import { newId } from "@/db/columns";
import { companies, conflicts, people } from "@/db/schema";
import { AppError } from "@/lib/errors";
import { localDay, shortDay } from "@/lib/format-dates";
import type { Actor } from "@/lib/permissions/types";
import { localDateRange } from "@/lib/schedule/local-date-range";
import { toInstant } from "@/lib/schedule/to-instant";
import type { addConflictSchema, conflictIdsSchema } from "@/lib/schemas/conflicts";
import { recordAudit } from "./audit";
import { assertOwn } from "./guard";
import { inTransaction } from "./transaction";

/** More than anyone needs; less than what would make a list unreadable. */
const MOST_OPEN = 200;

type NewConflict = z.output<typeof addConflictSchema>;

export type OwnConflict = {
  /** The rows behind it, one a company. */
  ids: string[];
  localFrom: string;
  localTo: string;
  timeFrom: string | null;
  timeTo: string | null;
  reason: string | null;
  told: { company: string; state: "asked" | "agreed" | "declined" }[];
};

/** The actor's own impossible dates that are not over yet, in order; the same dates told to several companies are one entry. */
export async function listOwnConflicts(actor: Actor, now = new Date()): Promise<OwnConflict[]> {
  const own = actor.people.map((p) => p.id);
  if (own.length === 0) return [];
  const rows = await db
    .select({
      id: conflicts.id,
      localFrom: conflicts.localFrom,
      localTo: conflicts.localTo,
      timeFrom: conflicts.timeFrom,
      timeTo: conflicts.timeTo,
      reason: conflicts.reason,
      state: conflicts.state,
      company: companies.name,
    })
    .from(conflicts)
    .innerJoin(people, eq(people.id, conflicts.personId))
    .innerJoin(companies, eq(companies.id, people.companyId))
    .where(
      and(
        inArray(conflicts.personId, own),
        isNull(conflicts.removedAt),
        gte(conflicts.endsAt, now),
      ),
    )
    .orderBy(asc(conflicts.localFrom), asc(conflicts.timeFrom), asc(companies.name));
  const entries = new Map<string, OwnConflict>();
  for (const { id, state, company, ...dates } of rows) {
    const key = JSON.stringify(Object.values(dates));
    const entry = entries.get(key) ?? { ids: [], ...dates, told: [] };
    entry.ids.push(id);
    entry.told.push({ company, state });
    entries.set(key, entry);
  }
  return [...entries.values()];
}

/**
 * Writes that the actor cannot come, for each chosen company's record of them, in that company's zone. Telling the same
 * twice is telling it once. Returns the ids, for the way back. Throws `not-found` for a record that is not theirs.
 */
export async function addConflict(
  actor: Actor,
  input: NewConflict,
  now = new Date(),
): Promise<string[]> {
  for (const personId of input.personIds) assertOwn(actor, personId);
  return inTransaction(async (tx) => {
    // One writer a person at a time, so that a second press finds what the first wrote.
    await tx
      .select({ id: people.id })
      .from(people)
      .where(inArray(people.id, input.personIds))
      .for("update");
    const told = await tx
      .select({
        personId: people.id,
        companyId: companies.id,
        zone: companies.zone,
        locale: companies.locale,
      })
      .from(people)
      .innerJoin(companies, eq(companies.id, people.companyId))
      .where(inArray(people.id, input.personIds));
    if (told.length !== input.personIds.length) throw new AppError("not-found");
    const ids: string[] = [];
    for (const record of told) ids.push(await writeConflict(tx, actor, input, record, now));
    return ids;
  });
}

type Told = { personId: string; companyId: string; zone: string; locale: string };

async function writeConflict(
  tx: Tx,
  actor: Actor,
  input: NewConflict,
  told: Told,
  now: Date,
): Promise<string> {
  if (input.to < localDay(now, told.zone)) {
    throw new AppError("invalid", undefined, {
      fields: { from: "That is over already. Choose a day from today on." },
    });
  }
  const dates = {
    localFrom: input.from,
    localTo: input.to,
    timeFrom: input.timeFrom,
    timeTo: input.timeTo,
  };
  const open = await tx
    .select({
      id: conflicts.id,
      localFrom: conflicts.localFrom,
      localTo: conflicts.localTo,
      timeFrom: conflicts.timeFrom,
      timeTo: conflicts.timeTo,
    })
    .from(conflicts)
    .where(
      and(
        eq(conflicts.personId, told.personId),
        isNull(conflicts.removedAt),
        gte(conflicts.endsAt, now),
      ),
    );
  const same = open.find(
    (c) =>
      c.localFrom === dates.localFrom &&
      c.localTo === dates.localTo &&
      c.timeFrom === dates.timeFrom &&
      c.timeTo === dates.timeTo,
  );
  if (same) {
    // The same time told again: what is said of it now counts.
    if (input.reason !== null)
      await tx.update(conflicts).set({ reason: input.reason }).where(eq(conflicts.id, same.id));
    return same.id;
  }
  if (open.length >= MOST_OPEN)
    throw new AppError(
      "refused",
      "That is more dates than fit here. Join some into ranges, or speak to the company.",
    );
  const id = newId();
  await tx.insert(conflicts).values({
    id,
    personId: told.personId,
    ...dates,
    zone: told.zone,
    startsAt:
      input.timeFrom === null
        ? localDateRange(input.from, told.zone).from
        : toInstant(input.from, input.timeFrom, told.zone).instant,
    endsAt:
      input.timeTo === null
        ? localDateRange(input.to, told.zone).to
        : toInstant(input.to, input.timeTo, told.zone).instant,
    reason: input.reason,
  });
  const days =
    input.from === input.to
      ? shortDay(input.from, told.locale)
      : `${shortDay(input.from, told.locale)} to ${shortDay(input.to, told.locale)}`;
  await recordAudit(tx, actor, {
    companyId: told.companyId,
    action: "conflict.tell",
    subjectKind: "conflict",
    subjectId: id,
    summary: `${actor.name} cannot come: ${days}`,
  });
  return id;
}

/** Takes own dates back. All or none: throws `not-found` when one of them is not the actor's. */
export async function removeConflicts(
  actor: Actor,
  input: z.output<typeof conflictIdsSchema>,
): Promise<void> {
  await setRemoved(actor, input.conflictIds, true);
}

/** Puts dates back that were taken back: the undo of `removeConflicts`. */
export async function restoreConflicts(
  actor: Actor,
  input: z.output<typeof conflictIdsSchema>,
): Promise<void> {
  await setRemoved(actor, input.conflictIds, false);
}

async function setRemoved(actor: Actor, conflictIds: string[], removed: boolean): Promise<void> {
  const ids = [...new Set(conflictIds)];
  const own = actor.people.map((p) => p.id);
  if (own.length === 0) throw new AppError("not-found");
  await inTransaction(async (tx) => {
    const rows = await tx
      .select({ id: conflicts.id, companyId: people.companyId, removedAt: conflicts.removedAt })
      .from(conflicts)
      .innerJoin(people, eq(people.id, conflicts.personId))
      .where(and(inArray(conflicts.id, ids), inArray(conflicts.personId, own)));
    if (rows.length !== ids.length) throw new AppError("not-found");
    await tx
      .update(conflicts)
      .set({ removedAt: removed ? sql`coalesce(${conflicts.removedAt}, utc_timestamp(3))` : null })
      .where(inArray(conflicts.id, ids));
    for (const row of rows) {
      if ((row.removedAt !== null) === removed) continue;
      await recordAudit(tx, actor, {
        companyId: row.companyId,
        action: removed ? "conflict.take-back" : "conflict.restore",
        subjectKind: "conflict",
        subjectId: row.id,
        summary: removed
          ? `${actor.name} took an impossible date back`
          : `${actor.name} put an impossible date back`,
      });
    }
  });
}
