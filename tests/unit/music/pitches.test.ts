// Numbers and octaves follow scientific pitch notation (C4 = MIDI 60; the octave belongs to the
// letter). Parsing is held against tonal; spelling by key is common practice, no source.
import { Note } from "tonal";
import { describe, expect, test } from "vitest";
import { asciiPitchName } from "@/lib/music/ascii-pitch-name";
import { parsePitch } from "@/lib/music/parse-pitch";
import { pitchName } from "@/lib/music/pitch-name";
import type { SpellingPreference } from "@/lib/music/types";

/** Every pitch with every way to spell it: few enough to try them all. */
const everySpelling = Array.from({ length: 128 }, (_, midi) =>
  (["sharp", "flat", -7, -6, -5, -4, -3, -2, -1, 0, 1, 2, 3, 4, 5, 6, 7] as const).map(
    (prefer: SpellingPreference) => ({ midi, prefer }),
  ),
).flat();

describe("pitchName", () => {
  test.each<[number, SpellingPreference | undefined, string]>([
    [60, undefined, "C4"],
    [58, undefined, "B♭3"],
    [66, undefined, "F♯4"],
    [63, undefined, "E♭4"],
    [63, "sharp", "D♯4"],
    [66, "flat", "G♭4"],
    [70, "sharp", "A♯4"],
    [71, -6, "C♭5"],
    [65, 6, "E♯4"],
    [60, 7, "B♯3"],
    [68, -3, "A♭4"],
    [68, 4, "G♯4"],
    [0, undefined, "C-1"],
    [127, undefined, "G9"],
    [60.5, undefined, "C4 +50c"],
    [69.5, undefined, "A4 +50c"],
  ])("%d preferring %s is %s", (midi, prefer, name) => {
    expect(pitchName(midi, prefer === undefined ? {} : { prefer })).toBe(name);
  });

  test("refuses what is not a number", () => {
    expect(() => pitchName(Number.NaN)).toThrow(RangeError);
  });

  test("every spelling names the same pitch (tonal)", () => {
    for (const { midi, prefer } of everySpelling) {
      const name = asciiPitchName(midi, { prefer });
      expect(Note.midi(name), name).toBe(midi);
    }
  });
});

describe("asciiPitchName", () => {
  test.each([
    [58, "Bb3"],
    [78, "F#5"],
    [60, "C4"],
  ])("%d is %s", (midi, name) => {
    expect(asciiPitchName(midi)).toBe(name);
  });
});

describe("parsePitch", () => {
  test.each([
    ["C4", 60, "C4"],
    ["Bb3", 58, "B♭3"],
    ["bb3", 58, "B♭3"],
    ["B♭3", 58, "B♭3"],
    ["F#5", 78, "F♯5"],
    ["F♯5", 78, "F♯5"],
    ["f♯5", 78, "F♯5"],
    [" a4 ", 69, "A4"],
    ["B#3", 60, "B♯3"],
    ["Cb5", 71, "C♭5"],
    ["E##4", 66, "E♯♯4"],
    ["C-1", 0, "C-1"],
    ["B#-2", 0, "B♯-2"],
    ["G9", 127, "G9"],
  ])("%s is %d", (text, midi, spelling) => {
    expect(parsePitch(text)).toEqual({ midi, spelling });
  });

  test.each([
    "",
    "C",
    "H4",
    "4",
    "C44",
    "G#9",
    "Cb-1",
    "C-2",
    "C#b4",
    "C###4",
    "middle C",
    "C4-C5",
    "60",
  ])("%j is no pitch", (text) => {
    expect(parsePitch(text)).toBeNull();
  });

  test("reads back whatever is written", () => {
    for (const { midi, prefer } of everySpelling) {
      const name = pitchName(midi, { prefer });
      expect(parsePitch(name), name).toEqual({ midi, spelling: name });
      expect(parsePitch(asciiPitchName(midi, { prefer }).toLowerCase())?.midi).toBe(midi);
    }
  });
});
