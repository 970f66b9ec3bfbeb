import "server-only";
import { and, asc, eq, isNull } from "drizzle-orm";
import { db } from "@/db/client";
import { numbers, roles, scoreParts, scores, vocalLines } from "@/db/schema";
import { AppError } from "@/lib/errors";
import type { ParsedScore } from "@/lib/formats/musicxml/types";
import { groupBy } from "@/lib/group-by";
import { tessitura } from "@/lib/music/tessitura";
import type { Actor } from "@/lib/permissions/types";
import { majorKeyOf } from "@/lib/score/keys";
import { formatLength } from "@/lib/score/number-length";
import { octaveLooks } from "@/lib/score/octave-looks";
import type { ReviewNumber, ReviewPart, ScoreReview } from "@/lib/score/review-types";
import { productionFor } from "../guard";
import { readingIn } from "./read-file";
import type { KeptReading } from "./read-file";

/** What a reading holds and what it would become: for whoever may change the score. Writes nothing. */
export async function scoreReview(
  actor: Actor,
  productionId: string,
  scoreId: string,
): Promise<ScoreReview> {
  const scope = await productionFor(actor, productionId, "score:change");
  const [reading, numberRows, lineRows, roleRows] = await Promise.all([
    readingIn(scope.id, scoreId),
    db
      .select({
        id: numbers.id,
        version: numbers.version,
        label: numbers.label,
        title: numbers.title,
        scoreId: numbers.scoreId,
      })
      .from(numbers)
      .where(and(eq(numbers.productionId, scope.id), isNull(numbers.removedAt)))
      .orderBy(asc(numbers.place), asc(numbers.id)),
    db
      .select({
        numberId: vocalLines.numberId,
        roleId: vocalLines.roleId,
        source: vocalLines.source,
        partKey: vocalLines.partKey,
        octaveShift: scoreParts.octaveShift,
      })
      .from(vocalLines)
      .innerJoin(roles, and(eq(roles.id, vocalLines.roleId), isNull(roles.removedAt)))
      .leftJoin(scoreParts, eq(scoreParts.id, vocalLines.scorePartId))
      .where(eq(roles.productionId, scope.id)),
    db
      .select({ id: roles.id, name: roles.name, kind: roles.kind })
      .from(roles)
      .where(and(eq(roles.productionId, scope.id), isNull(roles.removedAt)))
      .orderBy(asc(roles.place), asc(roles.id)),
  ]);
  const lines = groupBy(lineRows, (line) => line.numberId);
  const standing = numberRows.map(({ scoreId: from, ...number }) => ({
    from,
    number: {
      ...number,
      lines: (lines.get(number.id) ?? []).map(({ roleId, source, partKey, octaveShift }) => ({
        roleId,
        source,
        partKey,
        octaveShift: octaveShift ?? 0,
      })),
    } satisfies ReviewNumber,
  }));
  const title = titleOf(reading);
  const same =
    standing.find(({ from }) => from === reading.id) ??
    standing.find(
      ({ number }) => number.title.toLocaleLowerCase("en") === title.toLocaleLowerCase("en"),
    );
  return {
    scoreId: reading.id,
    fileName: reading.fileName,
    title,
    composer: reading.score.composer,
    warnings: reading.score.warnings.map((warning) => warning.message),
    parts: reading.parts.map(reviewPart),
    numbers: standing.map(({ number }) => number),
    roles: roleRows,
    numberId: same?.number.id ?? null,
    proposed: {
      label: same?.number.label ?? nextLabel(numberRows.map((row) => row.label)),
      title,
      ...detailsOf(reading.score),
    },
  };
}

function titleOf(reading: KeptReading): string {
  return reading.title.replace(/\.(musicxml|xml|mxl)$/i, "");
}

function reviewPart(part: KeptReading["parts"][number]): ReviewPart {
  const { low, high, histogram } = part;
  const sung = low !== null && high !== null;
  return {
    scorePartId: part.id,
    partKey: part.partId,
    name: part.name,
    vocal: part.vocal,
    line: sung
      ? {
          low,
          high,
          lowSpelled: part.lowSpelled ?? "",
          highSpelled: part.highSpelled ?? "",
          tessitura: histogram ? tessitura(histogram) : null,
        }
      : null,
    looksOff: sung && part.vocal ? octaveLooks(part.name, { low, high, histogram }) : null,
    warnings: part.warnings,
  };
}

/** What the score says of the number, as its form takes it; what it does not say stays empty. */
function detailsOf(score: ParsedScore): Omit<ScoreReview["proposed"], "label" | "title"> {
  const fifths = score.keys[0]?.fifths ?? null;
  const minutes = score.length.performed?.minutes ?? score.length.written.minutes;
  const tempo = score.tempo === null ? null : Math.round(score.tempo);
  return {
    key: fifths === null ? "" : (majorKeyOf(fifths) ?? ""),
    keyFifths: fifths !== null && Math.abs(fifths) <= 7 ? fifths : null,
    metre: score.metre !== null && score.metre.length <= 12 ? score.metre : "",
    tempo: tempo !== null && tempo >= 20 && tempo <= 400 ? String(tempo) : "",
    bars: score.measures.written > 0 ? String(score.measures.written) : "",
    length:
      minutes === null || minutes <= 0 || minutes >= 99
        ? ""
        : formatLength(Math.max(1, minutes * 60)),
  };
}

/** The whole number after the highest label: "4" after "3a". */
function nextLabel(labels: readonly string[]): string {
  const used = labels
    .map((label) => Number.parseInt(label, 10))
    .filter((value) => Number.isFinite(value));
  return String(Math.max(0, ...used) + 1);
}

/** Throws `not-found` unless this is a reading of the production that the actor may put in place. */
export async function assertReading(
  actor: Actor,
  productionId: string,
  scoreId: string,
): Promise<void> {
  const scope = await productionFor(actor, productionId, "score:change");
  const [row] = await db
    .select({ id: scores.id })
    .from(scores)
    .where(and(eq(scores.id, scoreId), eq(scores.productionId, scope.id)));
  if (!row) throw new AppError("not-found");
}
