// Reserves and shift: definitions of Herbst et al. (2012); the verdicts are this house's rule, worked by hand.
import { readFileSync } from "node:fs";
import path from "node:path";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { fitInWords } from "@/lib/music/fit-in-words";
import { mergeLines } from "@/lib/music/merge-lines";
import { rangeFit } from "@/lib/music/range-fit";
import type { RangeFit, SingerRange, VocalLine } from "@/lib/music/types";

const VERDICTS = ["out", "stretch", "fits"];

/** 100 quarters, most of them in the middle. */
const line = (low: number, high: number, atEnds = 2): VocalLine => ({
  low,
  high,
  histogram: {
    [String(low)]: atEnds,
    [String((low + high) / 2)]: 100 - 2 * atEnds,
    [String(high)]: atEnds,
  },
});

describe("rangeFit by hand", () => {
  test.each<[string, SingerRange, VocalLine, Partial<RangeFit>, string]>([
    [
      "the same range",
      { low: 60, high: 72 },
      line(60, 72),
      {
        verdict: "fits",
        shortBelow: 0,
        shortAbove: 0,
        shareOutside: 0,
        shareOutsideComfort: 0,
        lowerReserve: 0,
        upperReserve: 0,
        tessituraShift: 0,
        sits: "within",
      },
      "Fits",
    ],
    [
      "room on both sides: B♭3–A5 for A3–C6",
      { low: 57, high: 84 },
      line(58, 80),
      { verdict: "fits", lowerReserve: 1, upperReserve: 4, tessituraShift: -1.5 },
      "Fits",
    ],
    [
      "one semitone short at the top, 2 % of the time",
      { low: 57, high: 71 },
      line(58, 72),
      { verdict: "stretch", shortAbove: 1, upperReserve: -1, shareOutside: 0.02 },
      "1 short at top",
    ],
    [
      "two short below, 2 %",
      { low: 60, high: 80 },
      line(58, 72),
      { verdict: "stretch", shortBelow: 2, lowerReserve: -2, shareOutside: 0.02 },
      "2 short below",
    ],
    [
      "one short at each end, 4 % together",
      { low: 59, high: 71 },
      line(58, 72),
      { verdict: "stretch", shortBelow: 1, shortAbove: 1, shareOutside: 0.04 },
      "1 short at top, 1 below",
    ],
    [
      "two at the top and one below are three",
      { low: 59, high: 70 },
      line(58, 72),
      { verdict: "out", shortBelow: 1, shortAbove: 2 },
      "2 short at top, 1 below",
    ],
    [
      "three short",
      { low: 50, high: 69 },
      line(58, 72),
      { verdict: "out", shortAbove: 3, shareOutside: 0.02 },
      "3 short at top",
    ],
    [
      "one short for exactly 5 %",
      { low: 50, high: 71 },
      line(58, 72, 5),
      { verdict: "stretch", shortAbove: 1, shareOutside: 0.05 },
      "1 short at top",
    ],
    [
      "one short for 6 %",
      { low: 50, high: 71 },
      line(58, 72, 6),
      { verdict: "out", shortAbove: 1, shareOutside: 0.06 },
      "1 short at top",
    ],
    [
      "in range but the tessitura above the comfortable notes",
      { low: 48, high: 76, comfortableLow: 52, comfortableHigh: 64 },
      line(58, 72),
      {
        verdict: "stretch",
        shortBelow: 0,
        shortAbove: 0,
        shareOutside: 0,
        shareOutsideComfort: 0.98,
        sits: "high",
      },
      "In range, sits high",
    ],
    [
      "in range but the tessitura below the comfortable notes",
      { low: 48, high: 76, comfortableLow: 66 },
      line(58, 72),
      { verdict: "stretch", shareOutsideComfort: 0.98, sits: "low" },
      "In range, sits low",
    ],
    [
      "only the ends outside the comfortable notes",
      { low: 48, high: 76, comfortableLow: 60, comfortableHigh: 70 },
      line(58, 72),
      { verdict: "fits", shareOutsideComfort: 0.04, sits: "within" },
      "Fits",
    ],
    [
      "high in the voice though it fits",
      { low: 50, high: 72 },
      line(60, 72),
      { verdict: "fits", lowerReserve: 10, upperReserve: 0, tessituraShift: 5 },
      "Fits, sits high",
    ],
    [
      "low in the voice though it fits",
      { low: 60, high: 82 },
      line(60, 72),
      { verdict: "fits", tessituraShift: -5 },
      "Fits, sits low",
    ],
    [
      "typed in, inside: nothing lies outside for any time",
      { low: 57, high: 74 },
      { low: 60, high: 72 },
      { verdict: "fits", shareOutside: 0, shareOutsideComfort: 0, sits: null },
      "Fits",
    ],
    [
      "typed in, short: for how long is not known",
      { low: 57, high: 70 },
      { low: 60, high: 72 },
      { verdict: "stretch", shortAbove: 2, shareOutside: null, shareOutsideComfort: null },
      "2 short at top",
    ],
    [
      "an optional top note counts for nothing",
      { low: 57, high: 72 },
      { low: 60, high: 72, optionalHigh: 76, histogram: { "66": 90, "76": 10 } },
      { verdict: "fits", shortAbove: 0, shareOutside: 0, upperReserve: 0 },
      "Fits",
    ],
    [
      "another voice altogether",
      { low: 36, high: 55 },
      line(60, 72),
      { verdict: "out", shortAbove: 17, shareOutside: 1, tessituraShift: 20.5 },
      "17 short at top",
    ],
  ])("%s", (_name, singer, sung, expected, words) => {
    const fit = rangeFit(singer, sung);
    expect(fit).toMatchObject(expected);
    expect(fitInWords(fit)).toBe(words);
  });
});

describe("songs against singers (tests/fixtures/music/README.md)", () => {
  type Example = {
    work: string;
    case: string;
    songMidi: [number, number];
    singerMidi: [number, number];
    octaveShift?: number;
    feasibleShifts: number[];
    lowerReserve: number;
    upperReserve: number;
    tessituraShift: number;
  };
  const file = path.resolve(import.meta.dirname, "../../fixtures/music/transpositions.json");
  const examples = JSON.parse(readFileSync(file, "utf8")) as Example[];

  test.each(examples)("$work, $case", (example) => {
    const [low, high] = example.singerMidi;
    const octave = example.octaveShift ?? 0;
    const at = (shift: number) =>
      rangeFit(
        { low, high },
        { low: example.songMidi[0] + octave + shift, high: example.songMidi[1] + octave + shift },
      );
    expect(at(0)).toMatchObject({
      lowerReserve: example.lowerReserve,
      upperReserve: example.upperReserve,
      tessituraShift: example.tessituraShift,
    });
    const shifts = Array.from({ length: 25 }, (_, index) => index - 12);
    const feasible = shifts.filter((shift) => at(shift).verdict === "fits");
    expect(feasible).toEqual(example.feasibleShifts);
  });
});

describe("rangeFit for any singer and line", () => {
  const pitch = fc.integer({ min: 40, max: 84 });
  const span = fc
    .tuple(pitch, pitch)
    .map(([a, b]) => ({ low: Math.min(a, b), high: Math.max(a, b) }));
  const singers = fc
    .tuple(span, fc.integer({ min: 0, max: 6 }), fc.integer({ min: 0, max: 6 }), fc.boolean())
    .map(([{ low, high }, up, down, known]): SingerRange => {
      if (!known) return { low, high };
      const comfortableLow = Math.min(low + up, high);
      return { low, high, comfortableLow, comfortableHigh: Math.max(high - down, comfortableLow) };
    });
  const lines = fc
    .array(fc.tuple(pitch, fc.integer({ min: 1, max: 16 })), { minLength: 1, maxLength: 8 })
    .map((notes): VocalLine => {
      const histogram: Record<string, number> = {};
      for (const [at, eighths] of notes) {
        histogram[String(at)] = (histogram[String(at)] ?? 0) + eighths / 2;
      }
      const pitches = notes.map(([at]) => at);
      return { low: Math.min(...pitches), high: Math.max(...pitches), histogram };
    });

  test("moving both together changes nothing", () => {
    fc.assert(
      fc.property(singers, lines, fc.integer({ min: -12, max: 12 }), (singer, sung, by) => {
        const up = (bound: number | undefined) => (bound === undefined ? undefined : bound + by);
        const moved = rangeFit(
          {
            low: singer.low + by,
            high: singer.high + by,
            comfortableLow: up(singer.comfortableLow),
            comfortableHigh: up(singer.comfortableHigh),
          },
          {
            low: sung.low + by,
            high: sung.high + by,
            histogram: Object.fromEntries(
              Object.entries(sung.histogram ?? {}).map(([at, time]) => [
                String(Number(at) + by),
                time,
              ]),
            ),
          },
        );
        expect(moved).toEqual(rangeFit(singer, sung));
      }),
    );
  });

  test("a wider range never fits worse", () => {
    const more = fc.integer({ min: 0, max: 5 });
    fc.assert(
      fc.property(singers, lines, more, more, (singer, sung, down, up) => {
        const before = rangeFit(singer, sung);
        const after = rangeFit({ ...singer, low: singer.low - down, high: singer.high + up }, sung);
        expect(VERDICTS.indexOf(after.verdict)).toBeGreaterThanOrEqual(
          VERDICTS.indexOf(before.verdict),
        );
        expect(after.shareOutside ?? 0).toBeLessThanOrEqual(before.shareOutside ?? 0);
        expect(after.shortAbove + after.shortBelow).toBeLessThanOrEqual(
          before.shortAbove + before.shortBelow,
        );
      }),
    );
  });

  test("adding notes never lowers what is short", () => {
    fc.assert(
      fc.property(singers, lines, lines, (singer, sung, added) => {
        const before = rangeFit(singer, sung);
        const after = rangeFit(singer, mergeLines([sung, added]) ?? sung);
        expect(after.shortBelow).toBeGreaterThanOrEqual(before.shortBelow);
        expect(after.shortAbove).toBeGreaterThanOrEqual(before.shortAbove);
      }),
    );
  });
});
