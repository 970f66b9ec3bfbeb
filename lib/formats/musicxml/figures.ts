import type { Histogram } from "@/lib/music/types";
import type { MeasureRecord } from "./measure-record";
import {
  add,
  compare,
  multiply,
  rational,
  toFraction,
  toNumber,
  ZERO,
  type Rational,
} from "./rational";
import type { LineFigures } from "./types";

/**
 * Adds up bars of a part, each as often as it is performed.
 * In: the bars, and how often each is sung (once each when left out). Out: the figures of the line.
 */
export function lineFigures(
  measures: readonly MeasureRecord[],
  times?: readonly number[],
): LineFigures {
  const sung = new Map<number, Rational>();
  let attacks = 0;
  measures.forEach((measure, index) => {
    const count = times ? (times[index] ?? 0) : 1;
    if (count === 0) return;
    attacks += measure.attacks * count;
    for (const [pitch, quarters] of measure.sung) {
      const more = count === 1 ? quarters : multiply(quarters, rational(BigInt(count)));
      sung.set(pitch, add(sung.get(pitch) ?? ZERO, more));
    }
  });
  const pitches = [...sung].sort(([a], [b]) => a - b);
  const total = pitches.reduce((sum, [, quarters]) => add(sum, quarters), ZERO);
  const histogram: Histogram = {};
  const exact: Record<string, string> = {};
  for (const [pitch, quarters] of pitches) {
    histogram[String(pitch)] = toNumber(quarters);
    exact[String(pitch)] = toFraction(quarters);
  }
  /** Lower weighted quantile on exact fractions, as `quantile` gives it on decimals. */
  const percentile = (percent: bigint): number | null => {
    const wanted = multiply(total, rational(percent, 100n));
    let upTo = ZERO;
    for (const [pitch, quarters] of pitches) {
      upTo = add(upTo, quarters);
      if (compare(upTo, wanted) >= 0) return pitch;
    }
    return null;
  };
  return {
    quarters: toNumber(total),
    attacks,
    histogram,
    p10: percentile(10n),
    p25: percentile(25n),
    p50: percentile(50n),
    p75: percentile(75n),
    p90: percentile(90n),
    exact: { quarters: toFraction(total), histogram: exact },
  };
}
