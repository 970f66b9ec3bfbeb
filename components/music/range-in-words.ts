import { pitchName } from "@/lib/music/pitch-name";
import type { SingerRange } from "@/lib/music/types";

/** "G3–G5", or "G3–G5, comfortable B3–D5" where that is narrower. */
export function rangeInWords(range: SingerRange): string {
  const { low, high, comfortableLow = low, comfortableHigh = high } = range;
  const whole = `${pitchName(low)}–${pitchName(high)}`;
  return comfortableLow === low && comfortableHigh === high
    ? whole
    : `${whole}, comfortable ${pitchName(comfortableLow)}–${pitchName(comfortableHigh)}`;
}
