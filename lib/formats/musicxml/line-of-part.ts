import type { Histogram, VocalLine } from "@/lib/music/types";
import type { ScorePart } from "./types";

/**
 * The vocal line to keep of a part: performed figures where the road map is understood, else as
 * printed. Quarter tones are rounded outward in the range and to the nearest key in the histogram,
 * because ranges are kept in whole keys. Null when nothing in the part is sung.
 */
export function lineOfPart(part: ScorePart): VocalLine | null {
  if (!part.low || !part.high) return null;
  const figures = part.performed ?? part.written;
  const low = Math.floor(part.low.midi);
  const high = Math.ceil(part.high.midi);
  const optionalLow = Math.floor(part.lowWithOptional?.midi ?? low);
  const optionalHigh = Math.ceil(part.highWithOptional?.midi ?? high);
  let histogram: Histogram | undefined;
  if (figures && figures.quarters > 0) {
    histogram = {};
    for (const [pitch, quarters] of Object.entries(figures.histogram)) {
      const key = String(Math.round(Number(pitch)));
      histogram[key] = (histogram[key] ?? 0) + quarters;
    }
  }
  return {
    low,
    high,
    optionalLow: optionalLow < low ? optionalLow : undefined,
    optionalHigh: optionalHigh > high ? optionalHigh : undefined,
    histogram,
  };
}
