import { quantile } from "./quantile";
import type { Histogram, PitchSpan } from "./types";

/**
 * Where most of the singing lies: the middle half of the sung time, from the lower to the upper
 * quartile. In: a histogram. Out: two MIDI numbers; null when nothing is sung for any time.
 */
export function tessitura(histogram: Histogram): PitchSpan | null {
  const low = quantile(histogram, 0.25);
  const high = quantile(histogram, 0.75);
  return low === null || high === null ? null : { low, high };
}
