import { pitchName } from "./pitch-name";
import type { SpellingPreference } from "./types";

/**
 * A pitch for files and other programs: "Bb3", "F#5"; otherwise as `pitchName`.
 * In: a MIDI number (60 = C4) and how to spell it. Throws a RangeError when the number is not finite.
 */
export function asciiPitchName(
  midi: number,
  options: { prefer?: SpellingPreference } = {},
): string {
  return pitchName(midi, options).replace("♭", "b").replace("♯", "#");
}
