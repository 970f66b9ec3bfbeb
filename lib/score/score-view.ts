import { mergeLines } from "@/lib/music/merge-lines";
import { tessitura } from "@/lib/music/tessitura";
import type { Histogram, PitchSpan, VocalLine } from "@/lib/music/types";
import type { RoleKind } from "./review-types";

export type ScoreNumber = {
  id: string;
  label: string;
  title: string;
  keyName: string | null;
  keyFifths: number | null;
  metre: string | null;
  tempo: number | null;
  bars: number | null;
  seconds: number | null;
  version: number;
  /** The file it was read from; null when it was typed. */
  fileName: string | null;
};

export type ScoreRole = {
  id: string;
  name: string;
  kind: RoleKind;
  needed: number;
  covers: number;
  about: string | null;
  version: number;
};

export type ScoreLine = {
  id: string;
  roleId: string;
  numberId: string;
  source: "read" | "typed";
  low: number;
  high: number;
  lowSpelled: string;
  highSpelled: string;
  optionalLow: number | null;
  optionalHigh: number | null;
  histogram: Histogram | null;
  lowBar: string | null;
  highBar: string | null;
  scorePartId: string | null;
  partName: string | null;
  octaveShift: number | null;
};

/** A production's score as its page shows it. */
export type ScoreView = {
  numbers: ScoreNumber[];
  roles: ScoreRole[];
  /** In running order. */
  lines: ScoreLine[];
  mayChange: boolean;
};

/** What is drawn of one or several lines: their whole range, and where most of the singing lies if all of it is known. */
export function drawnLine(
  lines: readonly ScoreLine[],
): (PitchSpan & { tessitura: PitchSpan | null }) | null {
  const whole = mergeLines(lines.map(asVocalLine));
  return (
    whole && {
      low: whole.low,
      high: whole.high,
      tessitura: whole.histogram ? tessitura(whole.histogram) : null,
    }
  );
}

function asVocalLine(line: ScoreLine): VocalLine {
  return { low: line.low, high: line.high, histogram: line.histogram ?? undefined };
}

/** One scale for all lines of a page, a tone wider than they are at either end. */
export function scaleOf(lines: readonly PitchSpan[]): PitchSpan {
  if (lines.length === 0) return { low: 48, high: 84 };
  return {
    low: Math.min(...lines.map((line) => line.low)) - 2,
    high: Math.max(...lines.map((line) => line.high)) + 2,
  };
}
