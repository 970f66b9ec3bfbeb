import { spellPitch } from "./spell-pitch";
import type { SpellingPreference } from "./types";

const SIGNS: Record<string, string> = { "-1": "♭", "0": "", "1": "♯" };

/**
 * A pitch for people: "B♭3", "F♯5", with real accidental signs.
 * In: a MIDI number (60 = C4) and, if wanted, how to spell it: sharps, flats, or the fifths of a key
 * (none = as in C major: C♯ E♭ F♯ G♯ B♭). Between two keys the cents are added: 60.5 → "C4 +50c".
 * Throws a RangeError when the number is not finite.
 */
export function pitchName(midi: number, options: { prefer?: SpellingPreference } = {}): string {
  if (!Number.isFinite(midi)) throw new RangeError("A pitch has to be a number.");
  const key = Math.floor(midi);
  const cents = Math.round((midi - key) * 100);
  const { letter, alter, octave } = spellPitch(key, options.prefer);
  const name = `${letter}${SIGNS[String(alter)] ?? ""}${String(octave)}`;
  return cents === 0 ? name : `${name} +${String(cents)}c`;
}
