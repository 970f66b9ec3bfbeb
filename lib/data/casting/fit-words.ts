import "server-only";
import type { RangeOnFile } from "@/lib/data/ranges";
import { fitInWords } from "@/lib/music/fit-in-words";
import { rangeFit } from "@/lib/music/range-fit";
import type { FitVerdict, SingerRange, VocalLine } from "@/lib/music/types";

/** A singer against a role in a word or a few; without a verdict where the words say what is missing. */
export type FitWords = { verdict: FitVerdict | null; words: string };

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
export function fitWords(range: RangeOnFile | null, line: VocalLine | null): FitWords {
  if (!line) return { verdict: null, words: "Role has no line yet" };
  if (!range) return { verdict: null, words: "No range on file" };
  const fit = rangeFit(toSingerRange(range), line);
  return { verdict: fit.verdict, words: fitInWords(fit) };
}
