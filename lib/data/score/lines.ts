import "server-only";
import { and, eq } from "drizzle-orm";
import type { z } from "zod";
import { newId } from "@/db/columns";
import { numbers, roles, scoreParts, scores, vocalLines } from "@/db/schema";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";
import type { lineIdSchema, shiftPartSchema, writeLineSchema } from "@/lib/schemas/score";
import { shiftOctaves } from "@/lib/score/shift-octaves";
import { recordAudit } from "../audit";
import { productionFor } from "../guard";
import { inTransaction } from "../transaction";
import { lockScore, numberIn, roleIn } from "./scope";

/**
 * Types in what a role sings in a number, in place of what was typed before. What was read from a score gives way only when
 * the input says so; otherwise throws `refused`.
 */
export async function writeLine(
  actor: Actor,
  input: z.output<typeof writeLineSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "score:change");
  await inTransaction(async (tx) => {
    await lockScore(tx, scope.id);
    const role = await roleIn(tx, scope.id, input.roleId);
    const number = await numberIn(tx, scope.id, input.numberId);
    const here = and(eq(vocalLines.roleId, role.id), eq(vocalLines.numberId, number.id));
    const standing = await tx.select({ source: vocalLines.source }).from(vocalLines).where(here);
    if (standing.some((line) => line.source === "read") && !input.replaceRead) {
      throw new AppError(
        "refused",
        `${role.name}'s line in ${number.title} was read from a score. Say that yours is to replace it, or put the read one an octave up or down.`,
      );
    }
    await tx.delete(vocalLines).where(here);
    await tx.insert(vocalLines).values({
      id: newId(),
      roleId: role.id,
      numberId: number.id,
      source: "typed",
      low: input.low.midi,
      high: input.high.midi,
      lowSpelled: input.low.spelling,
      highSpelled: input.high.spelling,
    });
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "line.write",
      subjectKind: "role",
      subjectId: role.id,
      summary: `Typed ${role.name}'s line in ${number.title}: ${input.low.spelling} to ${input.high.spelling}`,
    });
  });
}

/** Removes one line for good; asked for once before. */
export async function removeLine(
  actor: Actor,
  input: z.output<typeof lineIdSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "score:change");
  await inTransaction(async (tx) => {
    await lockScore(tx, scope.id);
    const [line] = await tx
      .select({ id: vocalLines.id, roleId: roles.id, role: roles.name, number: numbers.title })
      .from(vocalLines)
      .innerJoin(roles, eq(roles.id, vocalLines.roleId))
      .innerJoin(numbers, eq(numbers.id, vocalLines.numberId))
      .where(
        and(
          eq(vocalLines.id, input.lineId),
          eq(roles.productionId, scope.id),
          eq(numbers.productionId, scope.id),
        ),
      );
    if (!line) throw new AppError("not-found");
    await tx.delete(vocalLines).where(eq(vocalLines.id, line.id));
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "line.remove",
      subjectKind: "role",
      subjectId: line.roleId,
      summary: `Removed ${line.role}'s line in ${line.number}`,
    });
  });
}

/** Puts a part that was read, and every line made from it, at so many octaves from where it is written. */
export async function shiftPart(
  actor: Actor,
  input: z.output<typeof shiftPartSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "score:change");
  await inTransaction(async (tx) => {
    await lockScore(tx, scope.id);
    const [part] = await tx
      .select({ id: scoreParts.id, name: scoreParts.name, octaveShift: scoreParts.octaveShift })
      .from(scoreParts)
      .innerJoin(scores, eq(scores.id, scoreParts.scoreId))
      .where(and(eq(scoreParts.id, input.scorePartId), eq(scores.productionId, scope.id)));
    if (!part) throw new AppError("not-found");
    const by = input.octaveShift - part.octaveShift;
    if (by === 0) return;
    await tx
      .update(scoreParts)
      .set({ octaveShift: input.octaveShift })
      .where(eq(scoreParts.id, part.id));
    const lines = await tx.select().from(vocalLines).where(eq(vocalLines.scorePartId, part.id));
    for (const line of lines) {
      const shifted = shiftOctaves(line, by);
      if (!shifted)
        throw new AppError(
          "refused",
          "That would take the line beyond what can be written. Leave it where it is.",
        );
      const { low, high, lowSpelled, highSpelled, optionalLow, optionalHigh, histogram } = shifted;
      await tx
        .update(vocalLines)
        .set({ low, high, lowSpelled, highSpelled, optionalLow, optionalHigh, histogram })
        .where(eq(vocalLines.id, line.id));
    }
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "line.octave",
      subjectKind: "score-part",
      subjectId: part.id,
      summary: `Put the part ${part.name} ${String(Math.abs(by))} octave${Math.abs(by) === 1 ? "" : "s"} ${by > 0 ? "up" : "down"}`,
      detail: { before: part.octaveShift, after: input.octaveShift },
    });
  });
}
