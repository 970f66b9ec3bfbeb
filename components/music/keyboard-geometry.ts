// How the keys of a drawn keyboard lie. One natural key is one unit wide; pitches are MIDI numbers.

const NATURAL_STEP = [0, 0, 1, 1, 2, 3, 3, 4, 4, 5, 5, 6];
const SHARPS = new Set([1, 3, 6, 8, 10]);

/** Width of a sharp key, in natural keys. */
export const SHARP_WIDTH = 0.58;

/** The lowest and highest keys drawn unless told: C2 to E6 holds what people sing. */
export const LOWEST_KEY = 36;
export const HIGHEST_KEY = 88;

const pitchClass = (midi: number) => ((midi % 12) + 12) % 12;

export function isSharp(midi: number): boolean {
  return SHARPS.has(pitchClass(midi));
}

function naturalIndex(midi: number): number {
  return Math.floor(midi / 12) * 7 + (NATURAL_STEP[pitchClass(midi)] ?? 0);
}

export type Key = {
  midi: number;
  sharp: boolean;
  /** Left edge and width, in natural keys from the left end. */
  x: number;
  width: number;
};

export type Keyboard = {
  keys: readonly Key[];
  /** How many naturals wide it is. */
  width: number;
  /** Middle of a key, as a share of the whole width from 0 to 1. */
  middle: (midi: number) => number;
};

/** The keys from one pitch to another; an end that falls on a sharp moves out to the next natural. */
export function layKeys(from: number, to: number): Keyboard {
  const first = isSharp(from) ? from - 1 : from;
  const last = isSharp(to) ? to + 1 : to;
  const base = naturalIndex(first);
  const width = naturalIndex(last) - base + 1;
  const place = (midi: number): Key => {
    const index = naturalIndex(midi) - base;
    return isSharp(midi)
      ? { midi, sharp: true, x: index + 1 - SHARP_WIDTH / 2, width: SHARP_WIDTH }
      : { midi, sharp: false, x: index, width: 1 };
  };
  const keys = Array.from({ length: last - first + 1 }, (_, index) => place(first + index));
  return {
    keys,
    width,
    middle: (midi) => {
      const key = place(Math.min(Math.max(midi, first), last));
      return (key.x + key.width / 2) / width;
    },
  };
}

/** Whole numbers only, so that rounding on server and browser cannot differ in the last digit. */
export function percent(share: number): string {
  return `${(share * 100).toFixed(2)}%`;
}
