// Worked by hand from the definition: the lowest pitch up to which at least the share p lies.
import { describe, expect, test } from "vitest";
import { mergeLines } from "@/lib/music/merge-lines";
import { quantile } from "@/lib/music/quantile";
import { tessitura } from "@/lib/music/tessitura";

describe("quantile", () => {
  test.each<[string, Record<string, number>, number, number | null]>([
    ["one pitch", { "60": 4 }, 0.1, 60],
    ["exactly reached", { "60": 1, "62": 1, "64": 1, "65": 1 }, 0.25, 60],
    ["just passed", { "60": 1, "62": 1, "64": 1, "65": 1 }, 0.26, 62],
    ["half", { "60": 1, "62": 1, "64": 1, "65": 1 }, 0.5, 62],
    ["all", { "60": 1, "72": 1 }, 1, 72],
    ["nothing yet", { "60": 1, "72": 1 }, 0, 60],
    ["by pitch and not by text", { "100": 1, "99": 3 }, 0.5, 99],
    ["a pitch without time is not sung", { "50": 0, "60": 1 }, 0, 60],
    ["thirds that do not add up in decimals", { "60": 1 / 3, "61": 1 / 3, "62": 1 / 3 }, 1 / 3, 60],
    ["tenths that do not add up in decimals", { "60": 0.1, "61": 0.2, "62": 0.3 }, 0.5, 61],
    ["nothing sung", {}, 0.5, null],
    ["only grace notes", { "60": 0 }, 0.5, null],
  ])("%s", (_name, histogram, p, expected) => {
    expect(quantile(histogram, p)).toBe(expected);
  });
});

describe("tessitura", () => {
  test("is the middle half", () => {
    expect(tessitura({ "55": 1, "60": 1, "64": 4, "67": 1, "79": 1 })).toEqual({
      low: 60,
      high: 64,
    });
  });
  test("needs sung time", () => {
    expect(tessitura({})).toBeNull();
  });
});

describe("mergeLines", () => {
  test("takes the outermost notes and adds the time", () => {
    expect(
      mergeLines([
        { low: 60, high: 72, histogram: { "60": 1, "72": 2 } },
        { low: 58, high: 70, histogram: { "58": 1, "60": 3 } },
      ]),
    ).toEqual({
      low: 58,
      high: 72,
      optionalLow: undefined,
      optionalHigh: undefined,
      histogram: { "58": 1, "60": 4, "72": 2 },
    });
  });

  test("keeps optional notes only where they go beyond what must be sung", () => {
    expect(
      mergeLines([
        { low: 60, high: 72, optionalHigh: 76, optionalLow: 59 },
        { low: 55, high: 74, optionalHigh: 75 },
      ]),
    ).toMatchObject({ low: 55, high: 74, optionalLow: undefined, optionalHigh: 76 });
  });

  test("has no histogram when one of the lines has none", () => {
    const merged = mergeLines([
      { low: 60, high: 72, histogram: { "60": 1 } },
      { low: 58, high: 70 },
    ]);
    expect(merged?.histogram).toBeUndefined();
  });

  test("of nothing is nothing", () => {
    expect(mergeLines([])).toBeNull();
  });

  test("leaves the lines as they were", () => {
    const line = { low: 60, high: 72, histogram: { "60": 1 } };
    mergeLines([line, line]);
    expect(line.histogram).toEqual({ "60": 1 });
  });
});
