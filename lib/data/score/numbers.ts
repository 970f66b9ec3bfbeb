import "server-only";
import { and, asc, eq, isNull, sql } from "drizzle-orm";
import type { z } from "zod";
import { newId } from "@/db/columns";
import { numbers } from "@/db/schema";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";
import type {
  addNumberSchema,
  changeNumberSchema,
  moveNumberSchema,
  numberIdSchema,
} from "@/lib/schemas/score";
import { recordAudit } from "../audit";
import { productionFor } from "../guard";
import { inTransaction } from "../transaction";
import { assertLabelFree, lockScore, nextNumberPlace, numberColumns, numberIn } from "./scope";

/** Adds a number at the end of the running order. Returns its id. */
export async function addNumber(
  actor: Actor,
  input: z.output<typeof addNumberSchema>,
): Promise<string> {
  const scope = await productionFor(actor, input.productionId, "score:change");
  return inTransaction(async (tx) => {
    await lockScore(tx, scope.id);
    await assertLabelFree(tx, scope.id, input.label, null);
    const id = newId();
    await tx.insert(numbers).values({
      id,
      productionId: scope.id,
      place: await nextNumberPlace(tx, scope.id),
      ...numberColumns(input),
    });
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "number.add",
      subjectKind: "number",
      subjectId: id,
      summary: `Added number ${input.label}, ${input.title}`,
    });
    return id;
  });
}

/** Changes what is known of a number. Throws `stale` when someone else changed it since `version` was read. */
export async function changeNumber(
  actor: Actor,
  input: z.output<typeof changeNumberSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "score:change");
  await inTransaction(async (tx) => {
    await lockScore(tx, scope.id);
    const before = await numberIn(tx, scope.id, input.numberId);
    await assertLabelFree(tx, scope.id, input.label, before.id);
    const [result] = await tx
      .update(numbers)
      .set({ ...numberColumns(input), version: sql`${numbers.version} + 1` })
      .where(
        and(
          eq(numbers.id, before.id),
          eq(numbers.productionId, scope.id),
          eq(numbers.version, input.version),
        ),
      );
    if (result.affectedRows === 0) throw new AppError("stale");
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "number.change",
      subjectKind: "number",
      subjectId: before.id,
      summary: `Changed number ${before.label}, ${before.title}`,
      detail: {
        before: { label: before.label, title: before.title },
        after: { label: input.label, title: input.title },
      },
    });
  });
}

/** Takes a number out; its lines wait with it. `restoreNumber` is the way back. */
export async function removeNumber(
  actor: Actor,
  input: z.output<typeof numberIdSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "score:change");
  await inTransaction(async (tx) => {
    await lockScore(tx, scope.id);
    const number = await numberIn(tx, scope.id, input.numberId);
    await tx.update(numbers).set({ removedAt: new Date() }).where(eq(numbers.id, number.id));
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "number.remove",
      subjectKind: "number",
      subjectId: number.id,
      summary: `Removed number ${number.label}, ${number.title}`,
    });
  });
}

/** Puts a removed number back where it was. Throws `invalid` when its label has gone to another meanwhile. */
export async function restoreNumber(
  actor: Actor,
  input: z.output<typeof numberIdSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "score:change");
  await inTransaction(async (tx) => {
    await lockScore(tx, scope.id);
    const [number] = await tx
      .select({ id: numbers.id, label: numbers.label, title: numbers.title })
      .from(numbers)
      .where(and(eq(numbers.id, input.numberId), eq(numbers.productionId, scope.id)));
    if (!number) throw new AppError("not-found");
    await assertLabelFree(tx, scope.id, number.label, number.id);
    await tx.update(numbers).set({ removedAt: null }).where(eq(numbers.id, number.id));
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "number.restore",
      subjectKind: "number",
      subjectId: number.id,
      summary: `Put back number ${number.label}, ${number.title}`,
    });
  });
}

/** Moves a number one place up or down in the running order; at either end it stays. */
export async function moveNumber(
  actor: Actor,
  input: z.output<typeof moveNumberSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "score:change");
  await inTransaction(async (tx) => {
    await lockScore(tx, scope.id);
    await numberIn(tx, scope.id, input.numberId);
    const order = await tx
      .select({ id: numbers.id, place: numbers.place })
      .from(numbers)
      .where(and(eq(numbers.productionId, scope.id), isNull(numbers.removedAt)))
      .orderBy(asc(numbers.place), asc(numbers.id));
    const from = order.findIndex((row) => row.id === input.numberId);
    const to = input.direction === "up" ? from - 1 : from + 1;
    const [moving, other] = [order[from], order[to]];
    if (!moving || !other) return;
    order[from] = other;
    order[to] = moving;
    for (const [index, row] of order.entries()) {
      if (row.place !== index + 1)
        await tx
          .update(numbers)
          .set({ place: index + 1 })
          .where(eq(numbers.id, row.id));
    }
  });
}
