// Each file's outcome was fixed in tests/fixtures/music/hostile/cases.json before the reader existed.
import { strToU8, zipSync } from "fflate";
import { describe, expect, test } from "vitest";
import { readScore } from "@/lib/formats/musicxml/read-score";
import { ScoreError, type ScoreErrorCode } from "@/lib/formats/musicxml/score-error";
import type { ParsedScore } from "@/lib/formats/musicxml/types";
import { fixture, jsonFixture } from "./fixtures";

type Bounds = {
  low?: string | null;
  high?: string | null;
  lowMidi?: number;
  highMidi?: number;
};
type Case = {
  file: string;
  outcome: "accept" | "accept-with-warning" | "reject";
  detail: string;
  range?: Bounds | Record<string, Bounds>;
};

const cases = jsonFixture("hostile/cases.json") as Case[];

function warningsOf(score: ParsedScore): string[] {
  return [...score.warnings, ...score.parts.flatMap(({ warnings }) => warnings)].map(
    ({ code }) => code,
  );
}

function refusal(bytes: Uint8Array): ScoreError | null {
  try {
    readScore(bytes, "score.musicxml");
    return null;
  } catch (error) {
    if (error instanceof ScoreError) return error;
    throw error;
  }
}

function expectBounds(score: ParsedScore, id: string, bounds: Bounds): void {
  const part = score.parts.find((one) => one.id === id);
  expect(part).toBeDefined();
  if (bounds.low !== undefined) expect(part?.low?.name ?? null).toBe(bounds.low);
  if (bounds.high !== undefined) expect(part?.high?.name ?? null).toBe(bounds.high);
  if (bounds.lowMidi !== undefined) expect(part?.low?.midi).toBe(bounds.lowMidi);
  if (bounds.highMidi !== undefined) expect(part?.high?.midi).toBe(bounds.highMidi);
}

describe("refused", () => {
  test.each(cases.filter(({ outcome }) => outcome === "reject"))("$file: $detail", ({ file }) => {
    const started = performance.now();
    const error = refusal(fixture(`hostile/${file}`));
    expect(error).toBeInstanceOf(ScoreError);
    expect(error?.message).toMatch(/^[A-Z].*\.$/);
    // The longest name or text that may be quoted is short; nothing of a local file gets in.
    expect(error?.message.length).toBeLessThan(220);
    expect(error?.message).not.toContain("root:");
    expect(performance.now() - started).toBeLessThan(3000);
  });

  test.each<[string, ScoreErrorCode, RegExp]>([
    ["xxe-file.musicxml", "score.entities", /entities/],
    ["billion-laughs.musicxml", "score.entities", /entities/],
    ["zip-container-xxe.mxl", "score.entities", /entities/],
    ["undefined-entity.musicxml", "score.malformed", /&eacute;/],
    ["truncated.musicxml", "score.malformed", /line \d+, column \d+/],
    ["html-root.musicxml", "score.not-musicxml", /<html>/],
    ["mei-root.musicxml", "score.not-musicxml", /<mei>/],
    ["opus-root.musicxml", "score.collection", /one by one/],
    ["empty.musicxml", "score.empty", /empty/],
    ["zip-bomb-lying-size.mxl", "score.too-large", /32 MB/],
    ["zip-encrypted-flag.mxl", "score.archive-password", /password/],
    ["zip-truncated.mxl", "score.archive", /cut off/],
    ["zip-traversal-container.mxl", "score.archive", /no score/],
    ["duplicate-part-ids.musicxml", "score.duplicate-part", /"P1"/],
    ["pitch-illegal.musicxml", "score.bad-pitch", /Bar 1/],
    ["duration-hostile.musicxml", "score.bad-duration", /bar 1/],
    ["no-parts.musicxml", "score.no-music", /no music/],
  ])("%s is %s", (file, code, words) => {
    const error = refusal(fixture(`hostile/${file}`));
    expect(error?.code).toBe(code);
    expect(error?.message).toMatch(words);
  });
});

describe("read", () => {
  test.each(cases.filter(({ outcome }) => outcome !== "reject"))(
    "$file: $detail",
    ({ file, outcome, range = {} }) => {
      const score = readScore(fixture(`hostile/${file}`), file);
      if (outcome === "accept-with-warning") expect(warningsOf(score)).not.toEqual([]);
      if ("P1" in range || "P2" in range) {
        for (const [id, bounds] of Object.entries(range)) {
          expectBounds(score, id, bounds);
        }
      } else expectBounds(score, score.parts[0]?.id ?? "", range);
      // No figure that goes into the database may be anything but a finite number.
      expect(JSON.stringify(score)).not.toMatch(/NaN|Infinity/);
      for (const { written } of score.parts) {
        expect(Object.values(written?.histogram ?? {}).every(Number.isFinite)).toBe(true);
      }
    },
  );

  test.each([
    ["zip-no-container.mxl", "score.no-container"],
    ["utf16-declared-but-utf8.musicxml", "score.encoding-declared"],
    ["part-not-in-list.musicxml", "score.part-not-listed"],
    ["unequal-measure-counts.musicxml", "score.unequal-parts"],
    ["divisions-zero.musicxml", "score.no-divisions"],
    ["backup-before-start.musicxml", "score.before-bar"],
    ["overfull-and-underfull.musicxml", "score.bars-too-long"],
    ["spoken-x-noteheads.musicxml", "score.spoken"],
    ["clefoct-and-transpose.musicxml", "score.octave-doubled"],
    ["chord-first.musicxml", "score.chord-first"],
    ["cue-only.musicxml", "score.cues-only"],
    ["repeat-times-million.musicxml", "score.road-map"],
    ["volta-gap.musicxml", "score.road-map"],
    ["dal-segno-loop.musicxml", "score.several-jumps"],
  ])("%s warns of %s", (file, code) => {
    expect(warningsOf(readScore(fixture(`hostile/${file}`), file))).toContain(code);
  });

  test("names keep their letters in every encoding", () => {
    const name = (file: string) => readScore(fixture(`hostile/${file}`), file).parts[0]?.name;
    expect(name("latin1.musicxml")).toBe("Ténor");
    expect(name("utf16le-bom.musicxml")).toBe("Ténor — טנור");
    expect(name("utf16be-bom.musicxml")).toBe("Ténor — טנור");
    expect(name("names-empty.musicxml")).toBe("P1");
  });

  test("a road map that is not understood leaves the printed figures", () => {
    const score = readScore(fixture("hostile/volta-gap.musicxml"), "x.musicxml");
    expect(score.measures.performed).toBeNull();
    expect(score.parts[0]?.performed).toBeNull();
    expect(score.parts[0]?.written?.quarters).toBeGreaterThan(0);
  });

  test("only grace notes: a range, but no tessitura", () => {
    const [part] = readScore(fixture("hostile/grace-only.musicxml"), "x.musicxml").parts;
    expect(part?.written).toMatchObject({ quarters: 0, histogram: {}, p25: null, p75: null });
  });

  test("without divisions each note counts by its length, with zero by its value", () => {
    for (const file of ["no-divisions.musicxml", "divisions-zero.musicxml"]) {
      const [part] = readScore(fixture(`hostile/${file}`), file).parts;
      expect(part?.written?.exact.histogram).toEqual({
        "60": "1",
        "64": "1",
        "67": "1",
        "72": "1",
      });
    }
  });
});

describe("made here because they are large", () => {
  const note = "<note><pitch><step>C</step><octave>4</octave></pitch><duration>1</duration></note>";
  const score = (bar: string, name = "Voice") =>
    `<?xml version="1.0"?><score-partwise><part-list><score-part id="P1"><part-name>${name}</part-name></score-part></part-list><part id="P1"><measure number="1"><attributes><divisions>1</divisions><time><beats>4</beats><beat-type>4</beat-type></time></attributes>${bar}</measure></part></score-partwise>`;
  const container = strToU8(
    '<container><rootfiles><rootfile full-path="s.xml"/></rootfiles></container>',
  );

  test("an archive that unpacks to 200 MB is stopped on the way", () => {
    const bomb = zipSync({
      "META-INF/container.xml": container,
      "s.xml": new Uint8Array(200 * 1024 * 1024).fill(32),
    });
    expect(bomb.length).toBeLessThan(1024 * 1024);
    expect(refusal(bomb)?.code).toBe("score.too-large");
  });

  test("an archive of 4,000 files is refused", () => {
    const files = Object.fromEntries(
      Array.from({ length: 4000 }, (_, index) => [`f${String(index)}`, new Uint8Array()]),
    );
    expect(refusal(zipSync({ "META-INF/container.xml": container, ...files }))?.code).toBe(
      "score.archive",
    );
  });

  test("10,000 elements inside one another are refused without a stack overflow", () => {
    const deep = score("<a>".repeat(10_000) + "</a>".repeat(10_000));
    expect(refusal(strToU8(deep))?.code).toBe("score.too-deep");
  });

  test("1,600 notes in one bar are counted and the bar is flagged", () => {
    const parsed = readScore(strToU8(score(note.repeat(1600))), "x.musicxml");
    expect(parsed.parts[0]?.written?.exact.histogram).toEqual({ "60": "1600" });
    expect(warningsOf(parsed)).toContain("score.bars-too-long");
  });

  test("a name of 100,000 characters is cut and said to be", () => {
    const parsed = readScore(strToU8(score(note, "x".repeat(100_000))), "x.musicxml");
    expect(parsed.parts[0]?.name).toHaveLength(200);
    expect(warningsOf(parsed)).toContain("score.name-cut");
  });

  test("a jump in words only is not performed", () => {
    const words =
      "<direction><direction-type><words>D.C. al Fine</words></direction-type></direction>";
    expect(readScore(strToU8(score(note + words)), "x.musicxml").measures.performed).toBeNull();
    expect(readScore(strToU8(score(note)), "x.musicxml").measures.performed).toBe(1);
  });
});
