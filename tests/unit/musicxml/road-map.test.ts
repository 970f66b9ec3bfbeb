// Orders worked out by hand from the rules in road-map.ts.
import { describe, expect, test } from "vitest";
import { noSigns, type RoadSigns } from "@/lib/formats/musicxml/measure-record";
import { performedOrder } from "@/lib/formats/musicxml/road-map";

/** Bars in shorthand: what stands on each, from 0. */
function bars(count: number, signs: Record<number, Partial<RoadSigns>>): RoadSigns[] {
  return Array.from({ length: count }, (_, index) => ({ ...noSigns(), ...signs[index] }));
}

function order(signs: RoadSigns[]): string | null {
  return performedOrder(signs).order?.join(" ") ?? null;
}

describe("repeats", () => {
  test.each<[string, RoadSigns[], string | null]>([
    ["none", bars(3, {}), "0 1 2"],
    ["from the start", bars(3, { 1: { backward: 2 } }), "0 1 0 1 2"],
    ["three times", bars(2, { 0: { backward: 3 } }), "0 0 0 1"],
    ["between signs", bars(4, { 1: { forward: true }, 2: { backward: 2 } }), "0 1 2 1 2 3"],
    [
      "from the section before",
      bars(4, { 0: { backward: 2 }, 2: { backward: 2 } }),
      "0 0 1 2 1 2 3",
    ],
    ["a sign that never closes", bars(3, { 1: { forward: true } }), "0 1 2"],
    [
      "two endings",
      bars(4, {
        1: { endingStart: "1", endingStop: true, backward: 2 },
        2: { endingStart: "2", endingStop: true },
      }),
      "0 1 0 2 3",
    ],
    [
      "an ending whose bracket stops before its repeat",
      bars(5, {
        1: { endingStart: "1", endingStop: true },
        2: { backward: 2 },
        3: { endingStart: "2", endingStop: true },
      }),
      "0 1 2 0 3 4",
    ],
    [
      "first and second time together",
      bars(3, {
        1: { endingStart: "1, 2", endingStop: true, backward: 3 },
        2: { endingStart: "3", endingStop: true },
      }),
      "0 1 0 1 0 2",
    ],
    [
      "a first ending alone",
      bars(3, { 1: { endingStart: "1", endingStop: true, backward: 2 } }),
      "0 1 0 2",
    ],
    [
      "endings with a gap",
      bars(3, {
        1: { endingStart: "1", endingStop: true, backward: 2 },
        2: { endingStart: "3", endingStop: true },
      }),
      null,
    ],
    [
      "a repeat within a repeat",
      bars(4, {
        0: { forward: true },
        1: { forward: true },
        2: { backward: 2 },
        3: { backward: 2 },
      }),
      null,
    ],
    ["a million times", bars(2, { 1: { backward: 1_000_000 } }), null],
  ])("%s", (_name, signs, expected) => {
    expect(order(signs)).toBe(expected);
  });
});

describe("jumps", () => {
  test.each<[string, RoadSigns[], string | null]>([
    ["D.C.", bars(2, { 1: { daCapo: true } }), "0 1 0 1"],
    ["D.C. al Fine", bars(3, { 0: { fine: true }, 2: { daCapo: true } }), "0 1 2 0"],
    [
      "D.S. al Fine",
      bars(4, { 1: { segno: "s" }, 2: { fine: true }, 3: { dalSegno: "s" } }),
      "0 1 2 3 1 2",
    ],
    [
      "D.S. al Coda",
      bars(6, { 1: { segno: "s" }, 2: { toCoda: "c" }, 4: { dalSegno: "s" }, 5: { coda: "c" } }),
      "0 1 2 3 4 1 2 5",
    ],
    [
      "repeats are taken before the jump and not after",
      bars(4, { 1: { backward: 2 }, 2: { fine: true }, 3: { daCapo: true } }),
      "0 1 0 1 2 3 0 1 2",
    ],
    [
      "only the last ending after the jump",
      bars(4, {
        1: { endingStart: "1", endingStop: true, backward: 2 },
        2: { endingStart: "2", endingStop: true },
        3: { daCapo: true },
      }),
      "0 1 0 2 3 0 2 3",
    ],
    [
      "two jumps, each once",
      bars(4, { 0: { segno: "s" }, 1: { dalSegno: "s" }, 2: { daCapo: true } }),
      "0 1 0 1 2 0 1 2 3",
    ],
    ["a segno that is missing", bars(2, { 1: { dalSegno: "s" } }), null],
    ["a coda that is missing", bars(3, { 0: { toCoda: "c" }, 1: { daCapo: true } }), null],
  ])("%s", (_name, signs, expected) => {
    expect(order(signs)).toBe(expected);
  });
});
