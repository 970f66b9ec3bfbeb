/** Sung quarter notes by sounding pitch: the MIDI number as text ("60" = C4) → quarters. */
export type Histogram = Record<string, number>;

/** What a singer can reach, as MIDI numbers. A comfortable bound left out is taken to be the bound of the range. */
export type SingerRange = {
  low: number;
  high: number;
  comfortableLow?: number | undefined;
  comfortableHigh?: number | undefined;
};

/**
 * What a role sings, in one number or over several. `low` and `high` are the notes that have to be
 * sung; the optional bounds include notes that may be left out (cue and ossia notes).
 * A line typed in by hand has no histogram.
 */
export type VocalLine = {
  low: number;
  high: number;
  optionalLow?: number | undefined;
  optionalHigh?: number | undefined;
  histogram?: Histogram | undefined;
};

export type FitVerdict = "fits" | "stretch" | "out";

/** How one singer's range meets one vocal line. Semitones, and shares from 0 to 1 of the sung time. */
export type RangeFit = {
  verdict: FitVerdict;
  /** Semitones missing at the bottom and at the top; never negative. */
  shortBelow: number;
  shortAbove: number;
  /** Null when notes lie outside and no histogram says for how long. */
  shareOutside: number | null;
  shareOutsideComfort: number | null;
  /** Room left below the lowest note and above the highest; negative when short. */
  lowerReserve: number;
  upperReserve: number;
  /** Positive: the line lies high in the voice; negative: low. */
  tessituraShift: number;
  /** Where the tessitura lies against the comfortable range; null without a histogram. */
  sits: "within" | "low" | "high" | "wide" | null;
};

/** A stretch of pitch, as MIDI numbers, both ends included. */
export type PitchSpan = { low: number; high: number };

/** "sharp", "flat", or the fifths of a key signature (−7 … 7), which spells as that key would. */
export type SpellingPreference = "sharp" | "flat" | number;
