import "server-only";
import { and, eq, isNull } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import { conflicts, people, positions } from "@/db/schema";
import { recordAudit } from "@/lib/data/audit";
import { productionFor } from "@/lib/data/guard";
import { inTransaction } from "@/lib/data/transaction";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";
import type { decideConflictSchema } from "@/lib/schemas/calls";

/** Agrees to a conflict or declines it (or opens the question again). Returns what it was before, to take it back. */
export async function decideConflict(
  actor: Actor,
  input: z.output<typeof decideConflictSchema>,
): Promise<{ was: "asked" | "agreed" | "declined" }> {
  const scope = await productionFor(actor, input.productionId, "conflicts:agree");
  const [row] = await db
    .select({ id: conflicts.id, state: conflicts.state, personId: people.id, name: people.name })
    .from(conflicts)
    .innerJoin(
      people,
      and(eq(people.id, conflicts.personId), eq(people.companyId, scope.companyId)),
    )
    .innerJoin(
      positions,
      and(
        eq(positions.personId, people.id),
        eq(positions.productionId, scope.id),
        isNull(positions.endedAt),
      ),
    )
    .where(and(eq(conflicts.id, input.conflictId), isNull(conflicts.removedAt)))
    .limit(1);
  if (!row) throw new AppError("not-found");
  await inTransaction(async (tx) => {
    await tx
      .update(conflicts)
      .set({ state: input.state, decidedAt: input.state === "asked" ? null : new Date() })
      .where(eq(conflicts.id, row.id));
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "conflict.decide",
      subjectKind: "person",
      subjectId: row.personId,
      summary: `A conflict of ${row.name}: ${input.state}`,
    });
  });
  return { was: row.state };
}
