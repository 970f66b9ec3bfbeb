import { overlaps } from "./overlaps";
import type { Interval } from "./types";

interface NextFreeInput {
  wanted: Interval;
  busy: readonly Interval[];
  within: Interval;
  stepMinutes: number;
}

/**
 * The free time nearest to the one wanted, of the same length: what to say about a clash. Starts are
 * tried `stepMinutes` apart, counted from the wanted start, both ways; of two equally near the later
 * wins, since people can more easily stay than come early. It lies wholly inside `within` and overlaps
 * nothing in `busy`. Null when there is none. Throws a RangeError when `stepMinutes` is not above zero.
 */
export function nextFree({ wanted, busy, within, stepMinutes }: NextFreeInput): Interval | null {
  if (!(stepMinutes > 0)) throw new RangeError("Steps need a length above zero minutes.");
  const length = wanted.to.getTime() - wanted.from.getTime();
  const step = stepMinutes * 60_000;
  const start = wanted.from.getTime();
  const furthest = Math.max(within.to.getTime() - length - start, start - within.from.getTime());

  for (let away = 0; away <= furthest; away += step) {
    for (const from of away === 0 ? [start] : [start + away, start - away]) {
      const candidate = { from: new Date(from), to: new Date(from + length) };
      const inside = candidate.from >= within.from && candidate.to <= within.to;
      if (inside && !busy.some((taken) => overlaps(taken, candidate))) return candidate;
    }
  }
  return null;
}
