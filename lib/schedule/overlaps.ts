import type { Interval } from "./types";

/**
 * Whether two stretches of time share any time. Half-open: one that ends at 11:00 and one that starts
 * at 11:00 do not overlap. An empty or reversed stretch holds no time and overlaps nothing.
 */
export function overlaps(a: Interval, b: Interval): boolean {
  return a.from < a.to && b.from < b.to && a.from < b.to && b.from < a.to;
}
