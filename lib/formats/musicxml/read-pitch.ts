import { spellPitch } from "@/lib/music/spell-pitch";
import { childText, type XmlElement } from "./xml-events";

const STEPS = "CDEFGAB";
const SEMITONES = [0, 2, 4, 5, 7, 9, 11];
const SIGNS: Record<string, string> = { "-2": "bb", "-1": "b", "0": "", "1": "#", "2": "##" };
/** The widest alteration in use, with room for quarter tones. */
const MAX_ALTER = 3;

/** What is added to the written pitch to get the sounding one. */
export type Transposition = { chromatic: number; diatonic: number; octaves: number };

type SoundingPitch = { midi: number; name: string; spelling: string };

function spell(midi: number, place: number): { name: string; spelling: string } {
  const whole = Math.floor(midi);
  const cents = Math.round((midi - whole) * 100);
  const octave = Math.floor(place / 7);
  const index = ((place % 7) + 7) % 7;
  const alter = whole - (12 * (octave + 1) + (SEMITONES[index] ?? 0));
  const plain = SIGNS[String(alter)];
  const other = spellPitch(whole);
  const name =
    plain === undefined || cents !== 0
      ? `${other.letter}${SIGNS[String(other.alter)] ?? ""}${String(other.octave)}`
      : `${STEPS.charAt(index)}${plain}${String(octave)}`;
  const suffix = cents === 0 ? "" : ` +${String(cents)}c`;
  return {
    name: name + suffix,
    spelling: name.replaceAll("#", "♯").replaceAll("b", "♭") + suffix,
  };
}

/**
 * The sounding pitch of a `<pitch>` element: 12 × (octave + 1) + step + alter + transposition.
 * Clefs with an 8 and 8va lines never enter into it. Null for a step, octave, alteration or sum
 * that no note can have.
 */
export function readPitch(pitch: XmlElement, shift: Transposition): SoundingPitch | null {
  const step = childText(pitch, "step") ?? "";
  const index = step.length === 1 ? STEPS.indexOf(step) : -1;
  const octaveText = childText(pitch, "octave") ?? "";
  const alter = Number(childText(pitch, "alter") ?? "0");
  if (index < 0 || !/^\d$/.test(octaveText)) return null;
  if (!Number.isFinite(alter) || Math.abs(alter) > MAX_ALTER) return null;
  const octave = Number(octaveText);
  const written = 12 * (octave + 1) + (SEMITONES[index] ?? 0) + alter;
  // Cents are as fine as pitch is told apart; more digits would only make near-equal keys.
  const midi = Math.round((written + shift.chromatic + 12 * shift.octaves) * 100) / 100;
  if (midi < 0 || midi > 127) return null;
  return { midi, ...spell(midi, 7 * (octave + shift.octaves) + index + shift.diatonic) };
}
