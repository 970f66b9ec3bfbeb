import type { Histogram } from "@/lib/music/types";

export type ScoreWarning = { code: string; message: string };

/** A sounding pitch and where it first stands. */
export type ScorePitch = {
  /** MIDI number; a quarter tone is a half: 60.5. */
  midi: number;
  /** As spelled in the score, for programs: "Bb3". */
  name: string;
  /** As spelled in the score, for people: "B♭3". */
  spelling: string;
  /** The bar's number as printed; it may be any text, and need not be unique. */
  bar: string;
};

/** What is sung, counted. Quarters are quarter notes. */
export type LineFigures = {
  quarters: number;
  attacks: number;
  histogram: Histogram;
  /** Quantiles by sung time; null when every note is a grace note. */
  p10: number | null;
  p25: number | null;
  p50: number | null;
  p75: number | null;
  p90: number | null;
  /** The same quarters as exact fractions: "5/2". */
  exact: { quarters: string; histogram: Record<string, string> };
};

export type ScorePart = {
  id: string;
  /** As in the score; its id when the score gives no name. */
  name: string;
  /** Has words under its notes, or a voice's name. */
  vocal: boolean;
  lyrics: number;
  staves: number;
  low: ScorePitch | null;
  high: ScorePitch | null;
  /** With cue and ossia notes, which may be left out. */
  lowWithOptional: ScorePitch | null;
  highWithOptional: ScorePitch | null;
  /** Notes with an x or no notehead: usually spoken, so not counted as sung. */
  spoken: { notes: number; low: ScorePitch; high: ScorePitch } | null;
  /** As printed once. Null when nothing is sung. */
  written: LineFigures | null;
  /** With repeats and jumps performed. Null also where the road map is not understood. */
  performed: LineFigures | null;
  warnings: ScoreWarning[];
};

export type ParsedScore = {
  /** The work's title; for a song out of a set, the set's. The file's name when there is none. */
  title: string | null;
  /** The song's own title within the work; null when it is the work's. */
  movement: string | null;
  composer: string | null;
  measures: { written: number; performed: number | null };
  /** Sounding keys, one per key signature of the leading part. */
  keys: { measure: string; fifths: number }[];
  /** The first time signature, "3+2/8"; "free" when there is none on purpose; null when not given. */
  metre: string | null;
  /** The first tempo, in quarter notes a minute. */
  tempo: number | null;
  /** Length of the music in quarter notes, and with its tempi in minutes (null without a tempo). */
  length: {
    written: { quarters: number; minutes: number | null };
    performed: { quarters: number; minutes: number | null } | null;
  };
  /** Bar indexes (from 0) in the order performed; null where the road map is not understood. */
  order: number[] | null;
  parts: ScorePart[];
  warnings: ScoreWarning[];
};
