import type { RangeFit } from "./types";

/** From this many semitones off the middle of the voice on, a line that fits is said to sit high or low. Common practice, no source. */
const OFF_CENTRE = 4;

const COMFORT = {
  within: "Fits",
  low: "In range, sits low",
  high: "In range, sits high",
  wide: "In range, sits wide",
} as const;

/**
 * The fit in a few words, for a cell of the casting grid: "Fits", "2 short at top", "4 short below",
 * "2 short at top, 1 below", "Fits, sits high", "In range, sits low" (outside the comfortable range).
 * In: what `rangeFit` gives. Out: plain text; the number of semitones is in it, colour is not needed.
 */
export function fitInWords(fit: RangeFit): string {
  if (fit.shortAbove > 0) {
    const below = fit.shortBelow > 0 ? `, ${String(fit.shortBelow)} below` : "";
    return `${String(fit.shortAbove)} short at top${below}`;
  }
  if (fit.shortBelow > 0) return `${String(fit.shortBelow)} short below`;
  if (fit.verdict !== "fits") return COMFORT[fit.sits ?? "within"];
  if (Math.abs(fit.tessituraShift) < OFF_CENTRE) return "Fits";
  return fit.tessituraShift > 0 ? "Fits, sits high" : "Fits, sits low";
}
