import { describe, expect, test } from "vitest";
import {
  castIn,
  choiceInWords,
  countCovers,
  isFar,
  missingNotes,
  openRoles,
  semitonesShort,
  shareInWords,
  singerText,
  sortByFit,
  withChoice,
  type Choice,
  type Grid,
  type GridRole,
  type GridSinger,
} from "@/lib/client/casting";
import { rangeFit } from "@/lib/music/range-fit";

// The expected orders and counts are counted by hand from the product's own rules.

const role = (id: string, low: number, high: number, extra: Partial<GridRole> = {}): GridRole => ({
  id,
  name: id,
  kind: "principal",
  needed: 1,
  line: { low, high, tessitura: null },
  ...extra,
});

function singer(name: string, low: number | null, high: number, roles: GridRole[]): GridSinger {
  const range =
    low === null
      ? null
      : { low, high, comfortableLow: null, comfortableHigh: null, kind: "claimed" as const };
  const cells = roles.map((one) => {
    const verdict = low !== null && one.line ? rangeFit({ low, high }, one.line).verdict : null;
    return [one.id, { verdict, words: verdict ?? "", choice: null }] as const;
  });
  return {
    personId: name,
    name,
    minor: false,
    range,
    calledBackFor: [],
    answer: null,
    cells: Object.fromEntries(cells),
  };
}

const maren = role("Maren", 58, 81);
const chorus = role("Chorus", 60, 72, { kind: "ensemble", needed: 2 });
const silent = role("Footman", 0, 0, { line: null });
const roles = [maren, chorus, silent];
const grid: Grid = {
  roles,
  singers: [
    singer("Ansgar", 40, 64, roles), // far short at the top
    singer("Bea", 58, 79, roles), // 2 short: at a stretch
    singer("Cato", 57, 82, roles), // fits
    singer("Dita", null, 0, roles), // nothing on file
    singer("Ezra", 55, 84, roles), // fits
  ],
  castPublished: false,
  mayChoose: true,
  zone: "Europe/London",
  locale: "en-GB",
};
const cast: Choice = { state: "cast", kind: "principal", version: 1 };

describe("what is chosen", () => {
  test.each([
    [cast, "Cast"],
    [{ state: "considered", kind: "principal" }, "Considered"],
    [{ state: "considered", kind: "cover" }, "Considered as cover"],
    [{ state: "cast", kind: "cover" }, "Cover"],
    [{ state: "cast", kind: "swing" }, "Swing"],
    [null, ""],
  ] as const)("%j reads %s", (choice, words) => {
    expect(choiceInWords(choice)).toBe(words);
  });

  test("stands in one cell and nowhere else, and comes off again", () => {
    const chosen = withChoice(grid, { personId: "Cato", roleId: "Maren" }, cast);
    expect(chosen.singers[2]?.cells["Maren"]?.choice).toEqual(cast);
    expect(chosen.singers[2]?.cells["Chorus"]?.choice).toBeNull();
    expect(chosen.singers.filter((_, index) => index !== 2)).toEqual(
      grid.singers.filter((_, index) => index !== 2),
    );
    expect(withChoice(chosen, { personId: "Cato", roleId: "Maren" }, null)).toEqual(grid);
    expect(grid.singers[2]?.cells["Maren"]?.choice).toBeNull();
  });

  test("a role is open until as many as it needs sing it; a cover does not count", () => {
    const one = withChoice(grid, { personId: "Cato", roleId: "Chorus" }, cast);
    const cover = withChoice(
      one,
      { personId: "Bea", roleId: "Chorus" },
      { ...cast, kind: "cover" },
    );
    expect(castIn(cover, "Chorus")).toBe(1);
    expect(openRoles(cover).map((r) => r.id)).toEqual(["Maren", "Chorus", "Footman"]);
    const two = withChoice(cover, { personId: "Ezra", roleId: "Chorus" }, cast);
    expect(openRoles(two).map((r) => r.id)).toEqual(["Maren", "Footman"]);
  });

  test("is found by the filter's text", () => {
    const chosen = withChoice(grid, { personId: "Cato", roleId: "Maren" }, cast).singers[2];
    expect(chosen && singerText(chosen, roles)).toContain("Cast Maren");
  });
});

describe("sorting by fit", () => {
  test("puts those who fit first, then by what is missing, and the unknown last", () => {
    expect(sortByFit(grid.singers, maren).map((s) => s.name)).toEqual([
      "Cato",
      "Ezra",
      "Bea",
      "Ansgar",
      "Dita",
    ]);
  });

  test("without a line everyone is equal and stands by name", () => {
    expect(sortByFit(grid.singers.toReversed(), silent).map((s) => s.name)).toEqual([
      "Ansgar",
      "Bea",
      "Cato",
      "Dita",
      "Ezra",
    ]);
  });

  test.each([
    [55, 79, 2],
    [60, 79, 4],
    [50, 90, 0],
  ])("%i–%i misses %i semitones of 58–81", (low, high, short) => {
    expect(semitonesShort({ low, high }, { low: 58, high: 81 })).toBe(short);
  });

  test("far out begins beyond half an octave at one end", () => {
    expect(isFar({ low: 58, high: 75 }, { low: 58, high: 81 })).toBe(false);
    expect(isFar({ low: 58, high: 74 }, { low: 58, high: 81 })).toBe(true);
    expect(isFar({ low: 65, high: 90 }, { low: 58, high: 81 })).toBe(true);
  });
});

describe("covers", () => {
  const of = (g: Grid) =>
    countCovers(g).map(({ roleId, fit, stretch, named }) => ({ roleId, fit, stretch, named }));

  test("while a role is open, one of those who fit is taken to sing it", () => {
    expect(of(grid)).toEqual([{ roleId: "Maren", fit: 1, stretch: 1, named: [] }]);
  });

  test("once it is cast, everyone else who fits could cover, whoever was cast", () => {
    expect(of(withChoice(grid, { personId: "Bea", roleId: "Maren" }, cast))).toEqual([
      { roleId: "Maren", fit: 2, stretch: 0, named: [] },
    ]);
  });

  test("names who is a cover already", () => {
    const chosen = withChoice(
      grid,
      { personId: "Ezra", roleId: "Maren" },
      { ...cast, kind: "cover" },
    );
    expect(of(chosen)[0]?.named).toEqual(["Ezra"]);
  });

  test("where only one could sing it at a stretch, nobody is left to cover", () => {
    const alone = { ...grid, singers: grid.singers.slice(0, 2) };
    expect(of(alone)).toEqual([{ roleId: "Maren", fit: 0, stretch: 0, named: [] }]);
  });
});

describe("what is missing, in words", () => {
  const detail = (low: number, high: number, lines: [string, number, number][]) => {
    const range = {
      low,
      high,
      comfortableLow: null,
      comfortableHigh: null,
      kind: "heard" as const,
      at: new Date(0),
    };
    const whole = {
      low: Math.min(...lines.map((l) => l[1])),
      high: Math.max(...lines.map((l) => l[2])),
    };
    return {
      singer: { name: "Wren", minor: false, ranges: { heard: range, claimed: null, best: range } },
      whole: { ...rangeFit({ low, high }, whole), words: "" },
      numbers: lines.map(([title, lineLow, lineHigh]) => ({
        numberId: title,
        label: "1",
        title,
        line: { low: lineLow, high: lineHigh },
        fit: rangeFit({ low, high }, { low: lineLow, high: lineHigh }),
        words: "",
      })),
    };
  };

  test("names the notes, how many, and only the numbers they are in", () => {
    // G5 is MIDI 79; the two above it are G♯5 (80) and A5 (81), from memory.
    expect(
      missingNotes(
        detail(55, 79, [
          ["The Ness Light", 58, 81],
          ["Low Water", 58, 70],
        ]),
      ),
    ).toEqual([
      { end: "top", amount: "Two semitones", notes: "G♯5, A5", titles: ["The Ness Light"] },
    ]);
  });

  test("both ends, one semitone in the singular, many notes by their ends", () => {
    expect(missingNotes(detail(59, 72, [["A", 58, 81]]))).toEqual([
      { end: "top", amount: "Nine semitones", notes: "C♯5 to A5", titles: ["A"] },
      { end: "bottom", amount: "One semitone", notes: "B♭3", titles: ["A"] },
    ]);
  });

  test("nothing where every note is in range", () => {
    expect(missingNotes(detail(50, 90, [["A", 58, 81]]))).toEqual([]);
  });

  test.each([
    [0.031, "3%"],
    [0.004, "less than 1%"],
    [1, "100%"],
  ])("a share of %d reads %s", (share, words) => {
    expect(shareInWords(share)).toBe(words);
  });
});
