import { describe, expect, test } from "vitest";
import { readScore } from "@/lib/formats/musicxml/read-score";
import { importChanges } from "@/lib/score/import-changes";
import { keyInShort, majorKeyOf, parseKey, signatureInWords } from "@/lib/score/keys";
import { formatLength, parseLength } from "@/lib/score/number-length";
import { octaveLooks } from "@/lib/score/octave-looks";
import { partKeys } from "@/lib/score/part-keys";
import type { ReviewNumber, ReviewPart } from "@/lib/score/review-types";
import { shiftOctaves } from "@/lib/score/shift-octaves";
import { suggestPart } from "@/lib/score/suggest-part";
import { whereItLies } from "@/lib/score/where-it-lies";
import { fixture, jsonFixture } from "../musicxml/fixtures";
import type { ExpectedWork } from "../musicxml/fixtures";

describe("keys as people type them", () => {
  // The circle of fifths: common practice, checked against tonal's Key in the second test.
  test.each([
    ["E♭", "E♭", -3],
    ["Eb", "E♭", -3],
    ["c", "c", -3],
    ["C minor", "c", -3],
    ["c# minor", "c♯", 4],
    ["F sharp minor", "f♯", 3],
    ["bb", "b♭", -5],
    ["b", "b", 2],
    ["B", "B", 5],
    ["Bbm", "b♭", -5],
    ["A Major", "A", 3],
    ["C♭", "C♭", -7],
  ])("%s", (text, name, fifths) => {
    expect(parseKey(text)).toEqual({ name, fifths });
  });

  test.each(["", "H", "G#", "E# major", "Cm7", "42"])(
    "not a key with at most seven signs: %s",
    (text) => {
      expect(parseKey(text)).toBeNull();
    },
  );

  test("fifths agree with tonal for every major key", async () => {
    const { Key } = await import("tonal");
    for (let fifths = -7; fifths <= 7; fifths += 1) {
      const name = majorKeyOf(fifths) ?? "";
      expect(Key.majorKey(name.replace("♭", "b").replace("♯", "#")).alteration).toBe(fifths);
      expect(parseKey(name)?.fifths).toBe(fifths);
    }
    for (const name of [
      "a",
      "e",
      "b",
      "f♯",
      "c♯",
      "g♯",
      "d♯",
      "a♯",
      "d",
      "g",
      "c",
      "f",
      "b♭",
      "e♭",
      "a♭",
    ]) {
      const tonic = `${name.charAt(0).toUpperCase()}${name.slice(1).replace("♭", "b").replace("♯", "#")}`;
      expect(parseKey(name)?.fifths).toBe(Key.minorKey(tonic).alteration);
    }
    expect(majorKeyOf(8)).toBeNull();
  });

  test("a signature nobody has named", () => {
    expect([-3, 0, 1, 4].map(signatureInWords)).toEqual([
      "3 flats",
      "no sharps or flats",
      "1 sharp",
      "4 sharps",
    ]);
    expect(keyInShort({ keyName: "d", keyFifths: -1 })).toBe("d");
    expect(keyInShort({ keyName: null, keyFifths: 4 })).toBe("4♯");
    expect(keyInShort({ keyName: null, keyFifths: null })).toBe("");
  });
});

test("lengths", () => {
  expect(["3:20", "4", " 12:05 "].map(parseLength)).toEqual([200, 240, 725]);
  expect(["", "0", "0:00", "3:60", "3.5", "-1", "100:00"].map(parseLength)).toEqual(
    Array(7).fill(null),
  );
  expect([200, 61, 3600].map(formatLength)).toEqual(["3:20", "1:01", "60:00"]);
});

describe("parts that look an octave off", () => {
  const expected = jsonFixture("works/expected.json") as Record<string, ExpectedWork>;

  // The reference scores' notes (their `features` in expected.json) name these three as sitting an octave from where they
  // sound or could be sung: two in plain treble clef, one with the octave written in twice.
  test("of all sung parts of the reference scores, exactly the three known ones", () => {
    const found: string[] = [];
    for (const [work, { file, vocal }] of Object.entries(expected)) {
      const score = readScore(fixture(`works/${file}`), file);
      for (const { part } of vocal) {
        const read = score.parts.find((each) => each.id === part);
        if (!read?.low || !read.high) throw new Error(`${work} has no ${part}`);
        const looks = octaveLooks(read.name, {
          low: read.low.midi,
          high: read.high.midi,
          histogram: read.written?.histogram,
        });
        if (looks) found.push(`${work}: ${read.name.replace(/\s+/g, " ")}, ${String(looks.shift)}`);
      }
    }
    expect(found.sort()).toEqual([
      "bonis-le-chat-sur-le-toit: Voice Ténor, -1",
      "schubert-heidenroeslein-d257: Singstimme, -1",
      "sullivan-the-long-day-closes: Alto (or 1st Tenor), -1",
    ]);
  });

  test("the first voice named counts, and a part too low is told to go up", () => {
    expect(octaveLooks("Alto (or 1st Tenor)", { low: 68, high: 83 })).toEqual({
      shift: -1,
      voice: "an alto",
    });
    expect(octaveLooks("Soprano 2", { low: 48, high: 65 })).toEqual({
      shift: 1,
      voice: "a soprano",
    });
    expect(octaveLooks("Women", { low: 56, high: 73 })).toBeNull();
    expect(octaveLooks("Countertenor", { low: 57, high: 72 })).toBeNull();
  });

  test("what no octave would bring right is left alone", () => {
    expect(octaveLooks("Bass", { low: 88, high: 100 })).toBeNull();
  });
});

describe("octaves", () => {
  const line = {
    low: 68,
    high: 83,
    lowSpelled: "G♯4",
    highSpelled: "B5",
    optionalLow: null,
    optionalHigh: 84,
    histogram: { "68": 1, "83": 2.5 },
  };
  test("down and back is where it was", () => {
    const down = shiftOctaves(line, -1);
    expect(down).toEqual({
      low: 56,
      high: 71,
      lowSpelled: "G♯3",
      highSpelled: "B4",
      optionalLow: null,
      optionalHigh: 72,
      histogram: { "56": 1, "71": 2.5 },
    });
    expect(down && shiftOctaves(down, 1)).toEqual(line);
  });
  test("not beyond what MIDI can say", () => {
    expect(shiftOctaves({ ...line, low: 5, high: 20 }, -1)).toBeNull();
    expect(shiftOctaves({ ...line, histogram: null }, 4)).toBeNull();
  });
});

test("part keys differ as a database compares them", () => {
  const keys = partKeys([
    { id: "P1" },
    { id: "p1" },
    { id: " P1 " },
    { id: "é" },
    { id: "e" },
    { id: "" },
    { id: "x".repeat(200) },
    { id: `${"x".repeat(199)}y` },
  ]);
  const folded = keys.map((key) =>
    key.normalize("NFKD").replace(/\p{M}/gu, "").toLowerCase().trim(),
  );
  expect(new Set(folded).size).toBe(keys.length);
  expect(keys[0]).toBe("P1");
  expect(Math.max(...keys.map((key) => key.length))).toBeLessThanOrEqual(80);
});

describe("where a role lies highest and lowest", () => {
  const base = {
    histogram: null,
    lowBar: null,
    highBar: null,
    optionalLow: null,
    optionalHigh: null,
  };
  const lines = [
    {
      ...base,
      numberId: "a",
      title: "Low Water",
      low: 58,
      high: 76,
      lowSpelled: "B♭3",
      highSpelled: "E5",
      lowBar: "9",
      histogram: { "58": 2, "76": 1 },
      optionalHigh: 79,
    },
    {
      ...base,
      numberId: "b",
      title: "The Ness Light",
      low: 62,
      high: 81,
      lowSpelled: "D4",
      highSpelled: "A5",
      highBar: "61",
      histogram: { "62": 1, "81": 7 },
    },
    {
      ...base,
      numberId: "c",
      title: "Lamps Out",
      low: 60,
      high: 79,
      lowSpelled: "C4",
      highSpelled: "G5",
    },
  ];
  test("only numbers near the outermost note, that one first, with bar and duration where they are known", () => {
    const { high, low } = whereItLies(lines);
    expect(high.map((place) => [place.title, place.pitch, place.bar, place.quarters])).toEqual([
      ["The Ness Light", "A5", "61", 7],
      ["Lamps Out", "G5", null, null],
    ]);
    expect(low.map((place) => [place.title, place.pitch, place.bar, place.quarters])).toEqual([
      ["Low Water", "B♭3", "9", 2],
      ["Lamps Out", "C4", null, null],
    ]);
  });
  test("a bound with notes that may be left out is told; no lines, no places", () => {
    expect(whereItLies([lines[0]!]).high[0]?.optional).toBe(79);
    expect(whereItLies([])).toEqual({ high: [], low: [] });
  });
});

describe("what an import proposes and says", () => {
  const part = (scorePartId: string, name: string, vocal = true): ReviewPart => ({
    scorePartId,
    partKey: scorePartId,
    name,
    vocal,
    looksOff: null,
    warnings: [],
    line: { low: 60, high: 72, lowSpelled: "C4", highSpelled: "C5", tessitura: null },
  });
  const roles = [
    { id: "maren", name: "Maren", kind: "principal" as const },
    { id: "bet", name: "Old Bet", kind: "principal" as const },
  ];
  const number: ReviewNumber = {
    id: "n",
    version: 3,
    label: "2",
    title: "Low Water",
    lines: [
      { roleId: "maren", source: "read", partKey: "P1", octaveShift: -1 },
      { roleId: "bet", source: "read", partKey: "P9", octaveShift: 0 },
    ],
  };

  test("a part goes where it went before, then to its namesake, then becomes a role, and an instrument is left out", () => {
    expect(suggestPart(part("P1", "Voice"), roles, number)).toMatchObject({
      to: "maren",
      octaveShift: -1,
    });
    expect(suggestPart(part("P1", "Voice"), roles, null)).toMatchObject({
      to: "new",
      name: "Voice",
      octaveShift: 0,
    });
    expect(suggestPart(part("P2", " old  BET"), roles, null)).toMatchObject({ to: "bet" });
    expect(suggestPart(part("P3", "Women"), roles, null)).toMatchObject({
      to: "new",
      kind: "ensemble",
    });
    expect(suggestPart(part("P4", "Piano", false), roles, null)).toMatchObject({ to: "leave" });
    expect(suggestPart({ ...part("P5", "Soprano"), line: null }, roles, null)).toMatchObject({
      to: "leave",
    });
  });

  test("every change is said before it is made", () => {
    const parts = [part("P1", "Voice"), part("P2", "Gulls"), part("P3", "Piano", false)];
    const plan = {
      label: "2",
      title: "Low Water",
      parts: [
        { scorePartId: "P1", to: "maren", name: "", kind: "principal" as const, octaveShift: 0 },
        {
          scorePartId: "P2",
          to: "new",
          name: "The Gulls",
          kind: "ensemble" as const,
          octaveShift: 0,
        },
        { scorePartId: "P3", to: "leave", name: "", kind: "principal" as const, octaveShift: 0 },
      ],
    };
    expect(importChanges(plan, { number, roles, parts }).map((change) => change.text)).toEqual([
      "Number 2, Low Water, takes the details above.",
      "Adds 1 role: The Gulls.",
      "Adds 2 lines read from the score.",
      "Replaces 2 lines read before in this number. Roles and casting stay.",
      "Old Bet: no line in this number any more.",
      "Leaves out Piano.",
    ]);
    const typed: ReviewNumber = {
      ...number,
      lines: [{ roleId: "maren", source: "typed", partKey: "typed", octaveShift: 0 }],
    };
    expect(
      importChanges(plan, { number: typed, roles, parts }).map((change) => change.text),
    ).toContain("The line typed in for Maren gives way to the one read.");
    expect(
      importChanges({ ...plan, label: "", title: "" }, { number: null, roles, parts })[0]?.text,
    ).toBe("Adds number without a name yet.");
  });
});
