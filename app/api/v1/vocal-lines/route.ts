import { readFileField } from "@/lib/auth/api-body";
import { ApiError, defineApiRoute } from "@/lib/auth/define-api-route";
import { LIMITS } from "@/lib/formats/musicxml/limits";
import { readScoreInWorker } from "@/lib/formats/musicxml/read-score-in-worker";
import { ScoreError } from "@/lib/formats/musicxml/score-error";
import type { LineFigures, ParsedScore, ScorePitch } from "@/lib/formats/musicxml/types";

const STATUS = { "wrong-kind": 415, "too-large": 413, refused: 422 } as const;

/** What each part of a MusicXML score sings. Nothing is stored. */
export const POST = defineApiRoute(async (request) => {
  const { name, bytes } = await readFileField(request, LIMITS.fileBytes);
  try {
    return shape(await readScoreInWorker(bytes, name));
  } catch (error) {
    if (error instanceof ScoreError)
      throw new ApiError(STATUS[error.kind], error.code, error.message, "file");
    throw error;
  }
});

function shape(score: ParsedScore) {
  return {
    title: score.title,
    measures: score.measures,
    keys: score.keys,
    parts: score.parts.map((part) => ({
      id: part.id,
      name: part.name,
      low: pitch(part.low),
      high: pitch(part.high),
      lowWithOptional: pitch(part.lowWithOptional),
      highWithOptional: pitch(part.highWithOptional),
      written: figures(part.written),
      performed: figures(part.performed),
      warnings: part.warnings,
    })),
    warnings: score.warnings,
  };
}

const pitch = (p: ScorePitch | null) => (p ? { midi: p.midi, name: p.name } : null);

function figures(line: LineFigures | null) {
  if (!line) return null;
  const { quarters, attacks, histogram, p10, p25, p50, p75, p90 } = line;
  return { quarters, attacks, histogram, p10, p25, p50, p75, p90 };
}
