import { expect } from "vitest";
import type { LineFigures, ParsedScore } from "@/lib/formats/musicxml/types";
import type { ExpectedPart } from "./fixtures";

type Figures = NonNullable<ExpectedPart["unrolled"]>;

function expectFigures(figures: LineFigures | null | undefined, expected: Figures): void {
  expect(figures?.exact).toEqual({
    quarters: expected.totalSungQuarters,
    histogram: expected.histogramQuarters,
  });
  expect(figures?.attacks).toBe(expected.attacks);
  const quantiles = expected.quantiles;
  expect([figures?.p10, figures?.p25, figures?.p50, figures?.p75, figures?.p90]).toEqual([
    quantiles?.p10.midi,
    quantiles?.p25.midi,
    quantiles?.p50.midi,
    quantiles?.p75.midi,
    quantiles?.p90.midi,
  ]);
}

/** Holds one part against its reference figures, without tolerance. */
export function expectPart(score: ParsedScore, expected: ExpectedPart): void {
  const part = score.parts.find(({ id }) => id === expected.part);
  const { range, rangeWithCue } = expected;
  expect([part?.low?.midi, part?.high?.midi]).toEqual([range.low.midi, range.high.midi]);
  expect([part?.low?.bar, part?.high?.bar]).toEqual([range.lowBar, range.highBar]);
  // The reference leaves spellings out where it transposed, and writes quarter tones its own way.
  if (range.lowSpelled !== null && Number.isInteger(range.low.midi)) {
    expect([part?.low?.name, part?.high?.name]).toEqual([range.lowSpelled, range.highSpelled]);
  }
  const widest = rangeWithCue === undefined || rangeWithCue === "same" ? range : rangeWithCue;
  expect([part?.lowWithOptional?.midi, part?.highWithOptional?.midi]).toEqual([
    widest.low.midi,
    widest.high.midi,
  ]);
  expectFigures(part?.written, expected.written);
  if (expected.unrolled) expectFigures(part?.performed, expected.unrolled);
  if (expected.attacksUnrolled !== undefined) {
    expect(part?.performed?.attacks ?? null).toBe(expected.attacksUnrolled);
  }
}
