import type { SpellingPreference } from "./types";

const LETTERS = ["F", "C", "G", "D", "A", "E", "B"] as const;
const LETTER_SEMITONE = { C: 0, D: 2, E: 4, F: 5, G: 7, A: 9, B: 11 } as const;

/** F♭ and B♯ on the line of fifths (C = 0): beyond them only double accidentals are left. */
const FLATTEST = -8;
const SHARPEST = 12;

/**
 * Spells a pitch. In: a whole MIDI number and how to spell it. Out: letter, alteration in semitones
 * (−1, 0 or 1) and the octave that belongs to the letter, so that 60 may be C4 or B♯3.
 *
 * Each pitch class is a place on the line of fifths (… B♭ F C G D A E B F♯ …); a key of n fifths
 * takes the twelve places from n − 3 to n + 8, which in C major gives C♯ E♭ F♯ G♯ B♭.
 * Common practice, no source.
 */
export function spellPitch(
  midi: number,
  prefer: SpellingPreference = 0,
): { letter: string; alter: number; octave: number } {
  // Sharps only: F … A♯ (−1 … 10). Flats only: G♭ … B (−6 … 5).
  const from = prefer === "sharp" ? -1 : prefer === "flat" ? -6 : Math.trunc(prefer) - 3;
  const place = (((midi * 7 - from) % 12) + 12) % 12;
  let fifths = from + place;
  while (fifths > SHARPEST) fifths -= 12;
  while (fifths < FLATTEST) fifths += 12;
  const letter = LETTERS[(((fifths + 1) % 7) + 7) % 7] ?? "C";
  const alter = Math.floor((fifths + 1) / 7);
  const octave = (midi - LETTER_SEMITONE[letter] - alter) / 12 - 1;
  return { letter, alter, octave };
}
