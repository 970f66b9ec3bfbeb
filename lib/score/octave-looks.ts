import { quantile } from "@/lib/music/quantile";
import type { Histogram, PitchSpan } from "@/lib/music/types";

type Voice = { name: string; words: RegExp; low: number; high: number };

/**
 * Ranges of trained voices: New Harvard Dictionary of Music, as quoted by Yale University Library, "Vocal Ranges";
 * contralto from Grove Music Online on the same page. Countertenor: operatic range, from memory.
 */
const VOICES: readonly Voice[] = [
  { name: "a mezzo-soprano", words: /\bmezzo/iu, low: 57, high: 77 },
  { name: "a contralto", words: /\bcontralto\b/iu, low: 53, high: 74 },
  { name: "a countertenor", words: /\bcounter-?tenor\b/iu, low: 55, high: 74 },
  { name: "a soprano", words: /\b(soprano|sopran|treble)s?\b/iu, low: 60, high: 81 },
  { name: "an alto", words: /\b(alto|alt)s?\b/iu, low: 53, high: 74 },
  { name: "a tenor", words: /(?<!\p{L})(t[ée]nor|tenore)s?\b/iu, low: 47, high: 67 },
  { name: "a baritone", words: /\b(baritone?|baryton|bariton)s?\b/iu, low: 43, high: 64 },
  { name: "a bass", words: /\b(bass|basse|basso|basses)\b/iu, low: 40, high: 60 },
  { name: "a woman's voice", words: /\bwomen\b/iu, low: 53, high: 81 },
  { name: "a man's voice", words: /\bmen\b/iu, low: 40, high: 67 },
];
/** From a bass's lowest note to a soprano's highest. */
const ANY: Omit<Voice, "words"> = { name: "any voice", low: 40, high: 81 };

export type OctaveLooks = {
  /** What would bring it right: one octave down or up. */
  shift: -1 | 1;
  /** The voice its name speaks of: "an alto". */
  voice: string;
};

function voiceNamed(name: string): Omit<Voice, "words"> {
  const found = VOICES.map((voice) => ({ voice, at: name.search(voice.words) })).filter(
    ({ at }) => at >= 0,
  );
  return found.sort((a, b) => a.at - b.at)[0]?.voice ?? ANY;
}

/**
 * Whether a part looks an octave off: the middle of its sung time lies outside the published range of the voice its name
 * speaks of (the first one named), and an octave down or up would bring it inside. In: the part's name, its range and what
 * is known of its sung time. Out: what would put it right, or null when nothing looks wrong.
 */
export function octaveLooks(
  name: string,
  line: PitchSpan & { histogram?: Histogram | null | undefined },
): OctaveLooks | null {
  const voice = voiceNamed(name);
  const middle =
    (line.histogram ? quantile(line.histogram, 0.5) : null) ?? (line.low + line.high) / 2;
  const inside = (pitch: number): boolean => pitch >= voice.low && pitch <= voice.high;
  if (inside(middle)) return null;
  const shift = middle > voice.high ? -1 : 1;
  return inside(middle + 12 * shift) ? { shift, voice: voice.name } : null;
}
