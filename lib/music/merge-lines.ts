import type { Histogram, VocalLine } from "./types";

/** The outermost of the bounds given, or undefined when none goes beyond the notes that must be sung. */
function beyond(
  outermost: (...values: number[]) => number,
  bound: number,
  optional: readonly (number | undefined)[],
): number | undefined {
  const all = outermost(bound, ...optional.filter((value) => value !== undefined));
  return all === bound ? undefined : all;
}

/**
 * A role's whole line over its numbers. In: its vocal lines. Out: the lowest and highest note of all,
 * optional bounds only where they go beyond those, and the histograms added up; null for no lines.
 * One line without a histogram leaves the whole without: a sum of some numbers would pass for all.
 */
export function mergeLines(lines: readonly VocalLine[]): VocalLine | null {
  if (lines.length === 0) return null;
  const low = Math.min(...lines.map((line) => line.low));
  const high = Math.max(...lines.map((line) => line.high));
  const histogram: Histogram = {};
  let complete = true;
  for (const line of lines) {
    if (!line.histogram) complete = false;
    for (const [pitch, quarters] of Object.entries(line.histogram ?? {})) {
      histogram[pitch] = (histogram[pitch] ?? 0) + quarters;
    }
  }
  return {
    low,
    high,
    optionalLow: beyond(
      Math.min,
      low,
      lines.map((line) => line.optionalLow),
    ),
    optionalHigh: beyond(
      Math.max,
      high,
      lines.map((line) => line.optionalHigh),
    ),
    histogram: complete ? histogram : undefined,
  };
}
