import { Note } from "tonal";

const WRITTEN = /^([A-Ga-g])(#{0,2}|b{0,2})(-[12]|[0-9])$/;

/**
 * Reads a pitch as people type it: C4, Bb3, B♭3, f#5, F♯5, E𝄫4.
 * In: any text. Out: the MIDI number (C4 = 60) and the spelling with real accidental signs; null when
 * it is not a pitch or lies outside MIDI's 0–127. The octave belongs to the letter: B♯3 is 60.
 */
export function parsePitch(text: string): { midi: number; spelling: string } | null {
  const plain = text
    .trim()
    .replaceAll("𝄪", "##")
    .replaceAll("𝄫", "bb")
    .replaceAll("♯", "#")
    .replaceAll("♭", "b")
    .replaceAll("♮", "")
    .replaceAll("−", "-");
  const match = WRITTEN.exec(plain);
  if (!match) return null;
  const [, letter = "", accidental = "", octave = ""] = match;
  const midi = Note.midi(`${letter.toUpperCase()}${accidental}${octave}`);
  if (midi === null || midi < 0 || midi > 127) return null;
  const signs = accidental.replaceAll("#", "♯").replaceAll("b", "♭");
  return { midi, spelling: `${letter.toUpperCase()}${signs}${octave}` };
}
