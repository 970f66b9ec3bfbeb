import type { Histogram, PitchSpan } from "@/lib/music/types";

export type SpelledLine = PitchSpan & {
  lowSpelled: string;
  highSpelled: string;
  optionalLow: number | null;
  optionalHigh: number | null;
  histogram: Histogram | null;
};

const respell = (spelling: string, octaves: number): string =>
  spelling.replace(/-?\d+$/, (octave) => String(Number(octave) + octaves));

const move = (pitch: number | null, octaves: number): number | null =>
  pitch === null ? null : pitch + 12 * octaves;

/**
 * A line put some octaves up (or down, negative), with its spellings and its histogram. Null when a note would leave
 * MIDI's 0–127.
 */
export function shiftOctaves<T extends SpelledLine>(line: T, octaves: number): T | null {
  if (octaves === 0) return line;
  const shifted = {
    ...line,
    low: line.low + 12 * octaves,
    high: line.high + 12 * octaves,
    lowSpelled: respell(line.lowSpelled, octaves),
    highSpelled: respell(line.highSpelled, octaves),
    optionalLow: move(line.optionalLow, octaves),
    optionalHigh: move(line.optionalHigh, octaves),
    histogram:
      line.histogram === null
        ? null
        : Object.fromEntries(
            Object.entries(line.histogram).map(([pitch, quarters]) => [
              String(Number(pitch) + 12 * octaves),
              quarters,
            ]),
          ),
  };
  const outermost = [
    shifted.low,
    shifted.high,
    shifted.optionalLow ?? shifted.low,
    shifted.optionalHigh ?? shifted.high,
  ];
  return outermost.some((pitch) => pitch < 0 || pitch > 127) ? null : shifted;
}
