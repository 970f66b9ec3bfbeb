import "server-only";
import { and, asc, eq, isNull } from "drizzle-orm";
import { db } from "@/db/client";
import { files, numbers, roles, scoreParts, scores, vocalLines } from "@/db/schema";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import type { ScoreLine, ScoreNumber, ScoreRole, ScoreView } from "@/lib/score/score-view";
import { productionFor } from "../guard";

/** The whole score of a production, for whoever may read it: numbers in running order, roles, and every line. */
export async function readScoreView(actor: Actor, productionId: string): Promise<ScoreView> {
  const scope = await productionFor(actor, productionId, "score:read");
  const [numberRows, roleRows, lineRows] = await Promise.all([
    numbersFor(scope.id),
    rolesFor(scope.id),
    linesFor(scope.id),
  ]);
  return {
    numbers: numberRows,
    roles: roleRows,
    lines: lineRows,
    mayChange: can(actor, "score:change", { companyId: scope.companyId, productionId: scope.id }),
  };
}

function numbersFor(productionId: string): Promise<ScoreNumber[]> {
  return db
    .select({
      id: numbers.id,
      label: numbers.label,
      title: numbers.title,
      keyName: numbers.keyName,
      keyFifths: numbers.keyFifths,
      metre: numbers.metre,
      tempo: numbers.tempo,
      bars: numbers.bars,
      seconds: numbers.seconds,
      version: numbers.version,
      fileName: files.name,
    })
    .from(numbers)
    .leftJoin(scores, eq(scores.id, numbers.scoreId))
    .leftJoin(files, eq(files.id, scores.fileId))
    .where(and(eq(numbers.productionId, productionId), isNull(numbers.removedAt)))
    .orderBy(asc(numbers.place), asc(numbers.id));
}

function rolesFor(productionId: string): Promise<ScoreRole[]> {
  return db
    .select({
      id: roles.id,
      name: roles.name,
      kind: roles.kind,
      needed: roles.needed,
      covers: roles.covers,
      about: roles.about,
      version: roles.version,
    })
    .from(roles)
    .where(and(eq(roles.productionId, productionId), isNull(roles.removedAt)))
    .orderBy(asc(roles.place), asc(roles.id));
}

function linesFor(productionId: string): Promise<ScoreLine[]> {
  return db
    .select({
      id: vocalLines.id,
      roleId: vocalLines.roleId,
      numberId: vocalLines.numberId,
      source: vocalLines.source,
      low: vocalLines.low,
      high: vocalLines.high,
      lowSpelled: vocalLines.lowSpelled,
      highSpelled: vocalLines.highSpelled,
      optionalLow: vocalLines.optionalLow,
      optionalHigh: vocalLines.optionalHigh,
      histogram: vocalLines.histogram,
      lowBar: vocalLines.lowBar,
      highBar: vocalLines.highBar,
      scorePartId: vocalLines.scorePartId,
      partName: scoreParts.name,
      octaveShift: scoreParts.octaveShift,
    })
    .from(vocalLines)
    .innerJoin(numbers, and(eq(numbers.id, vocalLines.numberId), isNull(numbers.removedAt)))
    .innerJoin(roles, and(eq(roles.id, vocalLines.roleId), isNull(roles.removedAt)))
    .leftJoin(scoreParts, eq(scoreParts.id, vocalLines.scorePartId))
    .where(and(eq(numbers.productionId, productionId), eq(roles.productionId, productionId)))
    .orderBy(asc(numbers.place), asc(vocalLines.id));
}
