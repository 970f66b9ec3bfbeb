import type { Histogram } from "./types";

/** Sums of decimals such as 1/3 do not come out even; a pitch counts as reached within this share of the whole. */
const ROUNDING = 1e-9;

/**
 * Lower weighted quantile: the lowest pitch up to which at least the share `p` of the sung time lies.
 * In: a histogram (pitch → quarters) and p from 0 to 1. Out: a pitch that is sung, never one between
 * two; null when nothing is sung for any time. No interpolation.
 */
export function quantile(histogram: Histogram, p: number): number | null {
  const sung = Object.entries(histogram)
    .filter(([, quarters]) => quarters > 0)
    .map(([pitch, quarters]) => ({ pitch: Number(pitch), quarters }))
    .sort((a, b) => a.pitch - b.pitch);
  const total = sung.reduce((sum, { quarters }) => sum + quarters, 0);
  let upTo = 0;
  for (const { pitch, quarters } of sung) {
    upTo += quarters;
    if (upTo >= (p - ROUNDING) * total) return pitch;
  }
  return sung.at(-1)?.pitch ?? null;
}
