import "server-only";
import { and, desc, eq, inArray } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import type { Db, Tx } from "@/db/client";
import { newId } from "@/db/columns";
import { people, positions, ranges } from "@/db/schema";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";
import type { claimRangeSchema, hearRangeSchema } from "@/lib/schemas/ranges";
import { recordAudit } from "./audit";
import { assertOwn, productionFor } from "./guard";
import { inTransaction } from "./transaction";

export type RangeOnFile = {
  low: number;
  high: number;
  comfortableLow: number | null;
  comfortableHigh: number | null;
  kind: "claimed" | "heard";
  at: Date;
};

export type PersonRanges = {
  claimed: RangeOnFile | null;
  heard: RangeOnFile | null;
  best: RangeOnFile | null;
};

/** The newest claimed and heard range of each person; `best` is the heard one where there is one. Asks no permission: the caller has. */
export async function rangesOf(
  tx: Db | Tx,
  personIds: string[],
): Promise<Map<string, PersonRanges>> {
  const found = new Map<string, PersonRanges>();
  if (personIds.length === 0) return found;
  const rows = await tx
    .select({
      personId: ranges.personId,
      kind: ranges.kind,
      low: ranges.low,
      high: ranges.high,
      comfortableLow: ranges.comfortableLow,
      comfortableHigh: ranges.comfortableHigh,
      at: ranges.createdAt,
    })
    .from(ranges)
    .where(inArray(ranges.personId, personIds))
    .orderBy(desc(ranges.createdAt), desc(ranges.id));
  for (const { personId, ...range } of rows) {
    const entry = found.get(personId) ?? { claimed: null, heard: null, best: null };
    entry[range.kind] ??= range;
    found.set(personId, entry);
  }
  for (const entry of found.values()) entry.best = entry.heard ?? entry.claimed;
  return found;
}

/** A singer writes their own range, to each chosen company's record of them. Throws `not-found` for one that is not theirs. */
export async function claimRange(
  actor: Actor,
  input: z.output<typeof claimRangeSchema>,
): Promise<void> {
  for (const personId of input.personIds) assertOwn(actor, personId);
  await db.insert(ranges).values(
    input.personIds.map((personId) => ({
      id: newId(),
      personId,
      kind: "claimed" as const,
      low: input.low,
      high: input.high,
      comfortableLow: input.comfortableLow,
      comfortableHigh: input.comfortableHigh,
      givenBy: actor.userId,
    })),
  );
}

/** The music team or the table writes the range they heard from a singer of this production. */
export async function hearRange(
  actor: Actor,
  input: z.output<typeof hearRangeSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "range:hear");
  const [person] = await db
    .select({ id: people.id, name: people.name })
    .from(people)
    .innerJoin(
      positions,
      and(
        eq(positions.personId, people.id),
        eq(positions.productionId, scope.id),
        eq(positions.kind, "actor"),
      ),
    )
    .where(and(eq(people.id, input.personId), eq(people.companyId, scope.companyId)));
  if (!person) throw new AppError("not-found");
  await inTransaction(async (tx) => {
    await tx.insert(ranges).values({
      id: newId(),
      personId: person.id,
      kind: "heard",
      low: input.low,
      high: input.high,
      comfortableLow: input.comfortableLow,
      comfortableHigh: input.comfortableHigh,
      productionId: scope.id,
      givenBy: actor.userId,
    });
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "range.hear",
      subjectKind: "person",
      subjectId: person.id,
      summary: `Wrote the range heard from ${person.name}`,
    });
  });
}
