import type { RangeOnFile } from "@/lib/data/ranges";
import type { SingerRange } from "@/lib/music/types";

/** A range on file as the drawings take it: what was not given is left out. */
export function singerRange(
  range: Pick<RangeOnFile, "low" | "high" | "comfortableLow" | "comfortableHigh">,
): SingerRange {
  return {
    low: range.low,
    high: range.high,
    ...(range.comfortableLow !== null && { comfortableLow: range.comfortableLow }),
    ...(range.comfortableHigh !== null && { comfortableHigh: range.comfortableHigh }),
  };
}
