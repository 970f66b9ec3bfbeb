import { ZERO, type Rational } from "./rational";

/** Signs of the road map on one bar. */
export type RoadSigns = {
  forward: boolean;
  /** How often the stretch that ends here is sung in all; null without a backward repeat. */
  backward: number | null;
  endingStart: string | null;
  endingStop: boolean;
  /** Labels of marks for jumps; the empty text for a mark without a label. */
  segno: string | null;
  coda: string | null;
  toCoda: string | null;
  fine: boolean;
  /** Taken at the end of this bar: a label, or "" for the only segno. */
  dalSegno: string | null;
  daCapo: boolean;
  /** A jump in words only, which says nothing to a program. */
  jumpInWords: boolean;
};

/** One bar of one part, as read. */
export type MeasureRecord = {
  number: string;
  implicit: boolean;
  /** Exact quarters sung, by sounding pitch. */
  sung: Map<number, Rational>;
  attacks: number;
  /** How far the bar reaches, and how far its time signature says; null for free time. */
  length: Rational;
  nominal: Rational | null;
  signs: RoadSigns;
  tempi: { at: Rational; quartersPerMinute: number }[];
  /** Sounding keys that begin in this bar. */
  keys: number[];
};

export function noSigns(): RoadSigns {
  return {
    forward: false,
    backward: null,
    endingStart: null,
    endingStop: false,
    segno: null,
    coda: null,
    toCoda: null,
    fine: false,
    dalSegno: null,
    daCapo: false,
    jumpInWords: false,
  };
}

export function newMeasure(
  attributes: Record<string, string>,
  nominal: Rational | null,
): MeasureRecord {
  return {
    number: attributes["number"] ?? "",
    implicit: attributes["implicit"] === "yes",
    sung: new Map(),
    attacks: 0,
    length: ZERO,
    nominal,
    signs: noSigns(),
    tempi: [],
    keys: [],
  };
}
