import "server-only";
import { and, asc, eq, isNull } from "drizzle-orm";
import { db } from "@/db/client";
import { numbers, vocalLines } from "@/db/schema";
import type { RangeOnFile } from "@/lib/data/ranges";
import { groupBy } from "@/lib/group-by";
import { fitInWords } from "@/lib/music/fit-in-words";
import { mergeLines } from "@/lib/music/merge-lines";
import { rangeFit } from "@/lib/music/range-fit";
import type { FitVerdict, SingerRange, VocalLine } from "@/lib/music/types";

export type LineRow = VocalLine & {
  roleId: string;
  numberId: string;
  label: string;
  title: string;
};

/** A singer against a role in a word or a few; without a verdict where the words say what is missing. */
export type FitWords = { verdict: FitVerdict | null; words: string };

/** The vocal lines of a production in running order. Asks no permission: the caller has. */
export async function linesOf(productionId: string): Promise<LineRow[]> {
  const rows = await db
    .select({
      roleId: vocalLines.roleId,
      numberId: numbers.id,
      label: numbers.label,
      title: numbers.title,
      low: vocalLines.low,
      high: vocalLines.high,
      optionalLow: vocalLines.optionalLow,
      optionalHigh: vocalLines.optionalHigh,
      histogram: vocalLines.histogram,
    })
    .from(vocalLines)
    .innerJoin(numbers, and(eq(numbers.id, vocalLines.numberId), isNull(numbers.removedAt)))
    .where(eq(numbers.productionId, productionId))
    .orderBy(asc(numbers.place));
  return rows.map((row) => ({
    ...row,
    optionalLow: row.optionalLow ?? undefined,
    optionalHigh: row.optionalHigh ?? undefined,
    histogram: row.histogram ?? undefined,
  }));
}

/** Each role's whole line over its numbers, by role; a role that sings nothing is not in it. */
export function wholeLines(lines: readonly LineRow[]): Map<string, VocalLine> {
  const whole = new Map<string, VocalLine>();
  for (const [roleId, own] of groupBy(lines, (line) => line.roleId)) {
    const merged = mergeLines(own);
    if (merged) whole.set(roleId, merged);
  }
  return whole;
}

/** A range on file as the arithmetic takes it. */
export function toSingerRange(range: RangeOnFile): SingerRange {
  return {
    low: range.low,
    high: range.high,
    comfortableLow: range.comfortableLow ?? undefined,
    comfortableHigh: range.comfortableHigh ?? undefined,
  };
}

/** The verdict on a range against a line, with its words. */
export function fitWords(range: RangeOnFile | null, line: VocalLine | undefined): FitWords {
  if (!line) return { verdict: null, words: "Role has no line yet" };
  if (!range) return { verdict: null, words: "No range on file" };
  const fit = rangeFit(toSingerRange(range), line);
  return { verdict: fit.verdict, words: fitInWords(fit) };
}
