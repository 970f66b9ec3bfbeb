import { readFileSync } from "node:fs";
import path from "node:path";

const root = path.resolve(import.meta.dirname, "../../fixtures/music");

export function fixture(name: string): Uint8Array {
  return readFileSync(path.join(root, name));
}

/** A JSON fixture, as the type its README describes. */
export function jsonFixture(name: string): unknown {
  return JSON.parse(readFileSync(path.join(root, name), "utf8"));
}

type ExpectedFigures = {
  totalSungQuarters: string;
  attacks: number;
  histogramQuarters: Record<string, string>;
  quantiles: Record<"p10" | "p25" | "p50" | "p75" | "p90", { midi: number }> | null;
};

type ExpectedRange = {
  low: { midi: number };
  high: { midi: number };
  lowSpelled: string | null;
  highSpelled: string | null;
  lowBar: string;
  highBar: string;
};

export type ExpectedPart = {
  part: string;
  name: string;
  range: ExpectedRange;
  rangeWithCue?: "same" | ExpectedRange;
  written: ExpectedFigures;
  unrolled?: ExpectedFigures;
  attacksUnrolled?: number | null;
};

export type ExpectedWork = {
  file: string;
  title: string;
  movement: string | null;
  composer: string;
  measures: { elements: number; unrolled: number | null };
  quartersWritten: string;
  quartersUnrolled: string;
  timeSignatures: [string, string][];
  keys: [string, number, string | null][];
  tempi: [string, { bpm?: number }][];
  unrolledOrder: number[] | null;
  vocal: ExpectedPart[];
};

export type ExpectedUnit = {
  parts: ExpectedPart[];
  measures: { elements: number; unrolled: number | null };
  unrolledOrder: number[] | null;
};

export function fraction(text: string): number {
  const [n, d = "1"] = text.split("/");
  return Number(n) / Number(d);
}
