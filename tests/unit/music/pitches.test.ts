// Numbers and octaves follow scientific pitch notation (C4 = MIDI 60; the octave belongs to the
// letter). Parsing is held against tonal; spelling by key is common practice, no source.
import fc from "fast-check";
import { Note } from "tonal";
import { describe, expect, test } from "vitest";
import { asciiPitchName } from "@/lib/music/ascii-pitch-name";
import { parsePitch } from "@/lib/music/parse-pitch";
import { pitchName } from "@/lib/music/pitch-name";
import type { SpellingPreference } from "@/lib/music/types";

const preference = fc.oneof(
  fc.constantFrom<SpellingPreference>("sharp", "flat"),
  fc.integer({ min: -7, max: 7 }),
);

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
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 127 }), preference, (midi, prefer) => {
        expect(Note.midi(asciiPitchName(midi, { prefer }))).toBe(midi);
      }),
    );
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
    ["G9", 127, "G9"],
  ])("%s is %d", (text, midi, spelling) => {
    expect(parsePitch(text)).toEqual({ midi, spelling });
  });

  test.each(["", "C", "H4", "4", "C44", "G#9", "Cb-1", "C#b4", "C###4", "middle C", "C4-C5", "60"])(
    "%j is no pitch",
    (text) => {
      expect(parsePitch(text)).toBeNull();
    },
  );

  test("reads back whatever is written", () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 127 }), preference, (midi, prefer) => {
        expect(parsePitch(pitchName(midi, { prefer }))?.midi).toBe(midi);
        expect(parsePitch(asciiPitchName(midi, { prefer }).toLowerCase())?.midi).toBe(midi);
      }),
    );
  });
});
