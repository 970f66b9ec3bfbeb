import type { Histogram } from "@/lib/music/types";

export type LineInNumber = {
  numberId: string;
  title: string;
  low: number;
  high: number;
  lowSpelled: string;
  highSpelled: string;
  histogram: Histogram | null;
  lowBar: string | null;
  highBar: string | null;
  optionalLow: number | null;
  optionalHigh: number | null;
};

export type HardPlace = {
  numberId: string;
  title: string;
  end: "high" | "low";
  pitch: string;
  midi: number;
  /** The first bar in which it stands; null when the line was typed. */
  bar: string | null;
  /** Quarter notes for which it is sung in this number; null when that is not known. */
  quarters: number | null;
  /** The bound with notes that may be left out, where it goes further. */
  optional: number | null;
};

/** Numbers whose end lies within so many semitones of the role's own end are worth naming. Common practice, no source. */
const NEAR = 2;

function place(line: LineInNumber, end: "high" | "low"): HardPlace {
  const midi = line[end];
  const optional = end === "high" ? line.optionalHigh : line.optionalLow;
  const quarters = line.histogram?.[String(midi)];
  return {
    numberId: line.numberId,
    title: line.title,
    end,
    pitch: end === "high" ? line.highSpelled : line.lowSpelled,
    midi,
    bar: end === "high" ? line.highBar : line.lowBar,
    quarters: quarters === undefined || quarters === 0 ? null : quarters,
    optional:
      optional !== null && (end === "high" ? optional > midi : optional < midi) ? optional : null,
  };
}

/**
 * Where a role lies highest and lowest: of its numbers, at most `atMost` per end whose highest (lowest) note is within two
 * semitones of the highest (lowest) of all, the outermost first, the longer sung before the shorter.
 */
export function whereItLies(
  lines: readonly LineInNumber[],
  atMost = 2,
): { high: HardPlace[]; low: HardPlace[] } {
  const pick = (end: "high" | "low"): HardPlace[] => {
    const outward = end === "high" ? 1 : -1;
    const places = lines
      .map((line) => place(line, end))
      .sort((a, b) => (b.midi - a.midi) * outward || (b.quarters ?? 0) - (a.quarters ?? 0));
    const outermost = places[0];
    if (!outermost) return [];
    return places.filter((each) => Math.abs(each.midi - outermost.midi) <= NEAR).slice(0, atMost);
  };
  return { high: pick("high"), low: pick("low") };
}
