import { tessitura } from "./tessitura";
import type { FitVerdict, Histogram, PitchSpan, RangeFit, SingerRange, VocalLine } from "./types";

/** House rule for "at a stretch": semitones that may be missing, bottom and top together. Common practice, no source. */
const STRETCH_SEMITONES = 2;

/** House rule for "at a stretch": share of the sung time that may lie outside. Common practice, no source. */
const STRETCH_SHARE = 0.05;

/** Room for sums of decimals when a share is compared with the rule. */
const ROUNDING = 1e-9;

/** Share of the sung time outside a span. Optional notes, beyond the line's own bounds, do not count. */
function shareBeyond(histogram: Histogram, line: PitchSpan, span: PitchSpan): number | null {
  let total = 0;
  let outside = 0;
  for (const [key, quarters] of Object.entries(histogram)) {
    const pitch = Number(key);
    if (pitch < line.low || pitch > line.high) continue;
    total += quarters;
    if (pitch < span.low || pitch > span.high) outside += quarters;
  }
  return total > 0 ? outside / total : null;
}

function share(line: VocalLine, span: PitchSpan): number | null {
  const known = line.histogram ? shareBeyond(line.histogram, line, span) : null;
  if (known !== null) return known;
  return line.low >= span.low && line.high <= span.high ? 0 : null;
}

function whereItSits(line: VocalLine, comfort: PitchSpan): RangeFit["sits"] {
  const middle = line.histogram ? tessitura(line.histogram) : null;
  if (!middle) return null;
  const low = middle.low < comfort.low;
  const high = middle.high > comfort.high;
  if (low && high) return "wide";
  return low ? "low" : high ? "high" : "within";
}

/**
 * How a singer's range meets a vocal line. In: MIDI numbers, low ≤ high, and the line's histogram if
 * it is known. Out: semitones and shares (0–1); see `RangeFit`.
 *
 * `lowerReserve`, `upperReserve` and `tessituraShift` = (lowerReserve − upperReserve) / 2 follow
 * Herbst et al. (2012). The verdict is a rule of this house: "fits" when no note lies outside the
 * range and the tessitura lies within the comfortable range; "stretch" when at most two semitones
 * are missing in all for at most 5 % of the sung time, or only the comfort is missed; else "out".
 * Optional notes are left out of all of it.
 */
export function rangeFit(singer: SingerRange, line: VocalLine): RangeFit {
  const lowerReserve = line.low - singer.low;
  const upperReserve = singer.high - line.high;
  const shortBelow = Math.max(0, -lowerReserve);
  const shortAbove = Math.max(0, -upperReserve);
  const comfort = {
    low: Math.max(singer.low, singer.comfortableLow ?? singer.low),
    high: Math.min(singer.high, singer.comfortableHigh ?? singer.high),
  };
  const shareOutside = share(line, singer);
  const sits = whereItSits(line, comfort);
  const short = shortBelow + shortAbove;
  let verdict: FitVerdict = "out";
  if (short === 0) verdict = sits === null || sits === "within" ? "fits" : "stretch";
  else if (short <= STRETCH_SEMITONES && (shareOutside ?? 0) <= STRETCH_SHARE + ROUNDING) {
    verdict = "stretch";
  }
  return {
    verdict,
    shortBelow,
    shortAbove,
    shareOutside,
    shareOutsideComfort: share(line, comfort),
    lowerReserve,
    upperReserve,
    tessituraShift: (lowerReserve - upperReserve) / 2,
    sits,
  };
}
