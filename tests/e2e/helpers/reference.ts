import { readFileSync } from "node:fs";
import path from "node:path";

type Reference = {
  vocal: {
    name: string;
    range: { lowSpelled: string; highSpelled: string };
    written: { quantiles: { p25: { name: string }; p75: { name: string } } };
  }[];
};

export type PartOfReference = { name: string; low: string; high: string; tessitura: string };

const FIGURES = path.resolve(import.meta.dirname, "../../fixtures/music/works/expected.json");
const printed = (pitch: string): string => pitch.replace("#", "♯").replace("b", "♭");

/**
 * The sung parts of a work as an independent reading has them (tests/fixtures/music/README.md), in order: the lowest and
 * the highest note as the score spells them, and the tessitura (the middle half of the sung time) in words.
 */
export function partsOf(work: string): PartOfReference[] {
  const works = JSON.parse(readFileSync(FIGURES, "utf8")) as Record<string, Reference>;
  return (works[work]?.vocal ?? []).map(({ name, range, written: { quantiles } }) => ({
    name,
    low: printed(range.lowSpelled),
    high: printed(range.highSpelled),
    tessitura: `${printed(quantiles.p25.name)} to ${printed(quantiles.p75.name)}`,
  }));
}

/** The same pitch an octave lower: "G♯4" is "G♯3". */
export const octaveDown = (pitch: string): string =>
  pitch.replace(/-?\d+$/, (octave) => String(Number(octave) - 1));

/** The number of a pitch by its name, C4 = 60: counted here anew, so that a test does not trust what it tests. */
export function midiOf(pitch: string): number {
  const [, letter = "C", sign = "", octave = "4"] = /^([A-G])([♯♭]?)(-?\d+)$/.exec(pitch) ?? [];
  const step = { C: 0, D: 2, E: 4, F: 5, G: 7, A: 9, B: 11 }[letter] ?? 0;
  return 12 * (Number(octave) + 1) + step + { "♯": 1, "♭": -1, "": 0 }[sign]!;
}
