import type { MeasureRecord } from "./measure-record";
import { add, compare, subtract, toNumber, ZERO, type Rational } from "./rational";

export type BarLength = {
  /** Quarters the bar lasts in its longest part. */
  quarters: Rational;
  /** Quarters its time signature says; null for free time. */
  nominal: Rational | null;
  number: string;
  implicit: boolean;
  /** Minutes at the tempo then in force; null before the first tempo. */
  minutes: number | null;
};

/**
 * How long each bar lasts. In: the bars of every part. A bar that no part fills lasts as long as its
 * time signature says.
 */
export function barLengths(parts: readonly (readonly MeasureRecord[])[]): BarLength[] {
  const bars = Math.max(0, ...parts.map((measures) => measures.length));
  let tempo: number | null = null;
  return Array.from({ length: bars }, (_, index) => {
    const here = parts.flatMap((measures) => measures[index] ?? []);
    const longest = here.reduce(
      (most, { length }) => (compare(length, most) > 0 ? length : most),
      ZERO,
    );
    const nominal = here.find((measure) => measure.nominal !== null)?.nominal ?? null;
    const quarters = longest.n === 0n ? (nominal ?? ZERO) : longest;
    const changes = here
      .flatMap(({ tempi }) => tempi)
      .sort((a, b) => compare(a.at, b.at))
      .filter(({ at }) => compare(at, quarters) <= 0);
    let minutes = 0;
    let from = ZERO;
    for (const { at, quartersPerMinute } of changes) {
      // Music before the first tempo is taken to go at it.
      minutes += toNumber(subtract(at, from)) / (tempo ?? quartersPerMinute);
      from = at;
      tempo = quartersPerMinute;
    }
    if (tempo !== null) minutes += toNumber(subtract(quarters, from)) / tempo;
    const [first] = here;
    return {
      quarters,
      nominal,
      number: first?.number ?? "",
      implicit: first?.implicit ?? false,
      minutes: tempo === null ? null : minutes,
    };
  });
}

/** The length of bars in the order given, each as often as it comes. */
export function totalLength(
  bars: readonly BarLength[],
  order: readonly number[],
): { quarters: number; minutes: number | null } {
  let quarters = ZERO;
  let minutes: number | null = 0;
  for (const index of order) {
    const bar = bars[index];
    if (!bar) continue;
    quarters = add(quarters, bar.quarters);
    minutes = minutes === null || bar.minutes === null ? null : minutes + bar.minutes;
  }
  return { quarters: toNumber(quarters), minutes };
}
