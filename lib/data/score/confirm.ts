import "server-only";
import { and, eq, inArray, isNull, sql } from "drizzle-orm";
import type { z } from "zod";
import type { Tx } from "@/db/client";
import { newId } from "@/db/columns";
import { numbers, roles, scoreParts, scores, vocalLines } from "@/db/schema";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";
import type { confirmReadingSchema } from "@/lib/schemas/score";
import { shiftOctaves } from "@/lib/score/shift-octaves";
import { recordAudit } from "../audit";
import { productionFor } from "../guard";
import { inTransaction } from "../transaction";
import { readingIn } from "./read-file";
import type { KeptReading } from "./read-file";
import {
  assertLabelFree,
  lockScore,
  nextNumberPlace,
  nextRolePlace,
  numberColumns,
  numberIn,
  roleIn,
  roleNamed,
} from "./scope";

type Input = z.output<typeof confirmReadingSchema>;
type PartPlan = Input["parts"][number];

export type Confirmed = {
  numberId: string;
  label: string;
  lines: number;
  newRoles: number;
  replaced: number;
};

/**
 * Puts a reading in place: its number, the new roles and the lines, all or nothing. With a `numberId`, the lines read
 * before in that number give way to these; roles, and whoever is cast in them, stay.
 * Throws `stale` when the number was changed meanwhile, `taken` when the reading stands as a number already, `not-found`
 * when a number, role or part is not this production's.
 */
export async function confirmReading(actor: Actor, input: Input): Promise<Confirmed> {
  const scope = await productionFor(actor, input.productionId, "score:change");
  const reading = await readingIn(scope.id, input.scoreId);
  return inTransaction(async (tx) => {
    await lockScore(tx, scope.id);
    await assertLabelFree(tx, scope.id, input.label, input.numberId);
    const number =
      input.numberId === null
        ? await newNumber(tx, scope.id, input)
        : await newerReading(tx, scope.id, input.numberId, input);
    const placed = await placeRoles(tx, scope.id, input.parts);
    const lines = linesOf(reading, input.parts, placed.roleOf, number.id);
    const roleIds = [...new Set(lines.map((line) => line.roleId))];
    if (roleIds.length > 0) {
      // What is left in the number for these roles was typed: a line is either read or typed, never both.
      await tx
        .delete(vocalLines)
        .where(and(eq(vocalLines.numberId, number.id), inArray(vocalLines.roleId, roleIds)));
      await tx.insert(vocalLines).values(lines);
    }
    for (const plan of input.parts) {
      await tx
        .update(scoreParts)
        .set({ octaveShift: plan.octaveShift })
        .where(and(eq(scoreParts.id, plan.scorePartId), eq(scoreParts.scoreId, reading.id)));
    }
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "score.import",
      subjectKind: "number",
      subjectId: number.id,
      summary: `Imported ${String(lines.length)} lines into number ${input.label}, ${input.title}`,
      detail: { lines: lines.length, newRoles: placed.made, replaced: number.replaced },
    });
    return {
      numberId: number.id,
      label: input.label,
      lines: lines.length,
      newRoles: placed.made,
      replaced: number.replaced,
    };
  });
}

async function newNumber(
  tx: Tx,
  productionId: string,
  input: Input,
): Promise<{ id: string; replaced: number }> {
  const [standing] = await tx
    .select({ label: numbers.label, title: numbers.title })
    .from(numbers)
    .where(
      and(
        eq(numbers.scoreId, input.scoreId),
        eq(numbers.productionId, productionId),
        isNull(numbers.removedAt),
      ),
    );
  if (standing) {
    throw new AppError(
      "taken",
      `This reading stands as number ${standing.label}, ${standing.title}, already. To read it in again, choose that number instead of a new one.`,
    );
  }
  const id = newId();
  await tx.insert(numbers).values({
    id,
    productionId,
    scoreId: input.scoreId,
    place: await nextNumberPlace(tx, productionId),
    ...numberColumns(input),
  });
  return { id, replaced: 0 };
}

async function newerReading(
  tx: Tx,
  productionId: string,
  numberId: string,
  input: Input,
): Promise<{ id: string; replaced: number }> {
  const number = await numberIn(tx, productionId, numberId);
  const [result] = await tx
    .update(numbers)
    .set({ ...numberColumns(input), scoreId: input.scoreId, version: sql`${numbers.version} + 1` })
    .where(
      and(
        eq(numbers.id, number.id),
        eq(numbers.productionId, productionId),
        eq(numbers.version, input.version ?? -1),
      ),
    );
  if (result.affectedRows === 0) throw new AppError("stale");
  if (number.scoreId !== null && number.scoreId !== input.scoreId) {
    const [before] = await tx
      .select({ version: scores.version })
      .from(scores)
      .where(eq(scores.id, number.scoreId));
    await tx
      .update(scores)
      .set({ version: (before?.version ?? 0) + 1 })
      .where(eq(scores.id, input.scoreId));
  }
  const [gone] = await tx
    .delete(vocalLines)
    .where(and(eq(vocalLines.numberId, number.id), eq(vocalLines.source, "read")));
  return { id: number.id, replaced: gone.affectedRows };
}

/** The role of each part that is not left out, made where it is new. Parts with one new name make one role together. */
async function placeRoles(
  tx: Tx,
  productionId: string,
  parts: readonly PartPlan[],
): Promise<{ roleOf: Map<string, string>; made: number }> {
  const roleOf = new Map<string, string>();
  const made = new Map<string, string>();
  for (const [index, plan] of parts.entries()) {
    if (plan.to === "leave") continue;
    if (plan.to !== "new") {
      roleOf.set(plan.scorePartId, (await roleIn(tx, productionId, plan.to)).id);
      continue;
    }
    const key = plan.name.toLocaleLowerCase("en");
    let roleId = made.get(key);
    if (roleId === undefined) {
      if ((await roleNamed(tx, productionId, plan.name)) !== null) {
        throw new AppError("invalid", undefined, {
          fields: {
            [`parts.${String(index)}.name`]: `There is a role ${plan.name} already: choose it from the list, or write another name.`,
          },
        });
      }
      roleId = newId();
      made.set(key, roleId);
      await tx.insert(roles).values({
        id: roleId,
        productionId,
        name: plan.name,
        kind: plan.kind,
        place: await nextRolePlace(tx, productionId),
      });
    }
    roleOf.set(plan.scorePartId, roleId);
  }
  return { roleOf, made: made.size };
}

function linesOf(
  reading: KeptReading,
  parts: readonly PartPlan[],
  roleOf: ReadonlyMap<string, string>,
  numberId: string,
): (typeof vocalLines.$inferInsert)[] {
  const seen = new Set<string>();
  return parts.flatMap((plan, index) => {
    const part = reading.parts.find((each) => each.id === plan.scorePartId);
    if (!part || seen.has(part.id))
      throw new AppError(
        "not-found",
        "A part of this score is not there any more. Read the file again.",
      );
    seen.add(part.id);
    const roleId = roleOf.get(part.id);
    if (roleId === undefined) return [];
    const { low, high, lowSpelled, highSpelled, optionalLow, optionalHigh, histogram } = part;
    const written =
      low === null || high === null
        ? null
        : {
            low,
            high,
            lowSpelled: lowSpelled ?? "",
            highSpelled: highSpelled ?? "",
            optionalLow,
            optionalHigh,
            histogram,
          };
    const line = written && shiftOctaves(written, plan.octaveShift);
    if (!line) {
      throw new AppError("invalid", undefined, {
        fields: {
          [`parts.${String(index)}.to`]: written
            ? "So many octaves away it cannot be written."
            : "Nothing is sung in this part: leave it out.",
        },
      });
    }
    return [
      {
        id: newId(),
        roleId,
        numberId,
        scorePartId: part.id,
        partKey: part.partId,
        source: "read" as const,
        quarters: part.quarters,
        lowBar: part.lowBar,
        highBar: part.highBar,
        ...line,
      },
    ];
  });
}
