import { lineFigures } from "./figures";
import { LIMITS } from "./limits";
import type { RoadSigns } from "./measure-record";
import { mergeSigns } from "./merge-signs";
import { openScore } from "./open-score";
import type { PartReader } from "./part-reader";
import { compare } from "./rational";
import { readParts } from "./read-parts";
import { performedOrder, type RoadMap } from "./road-map";
import { barLengths, totalLength, type BarLength } from "./score-length";
import type { ParsedScore, ScorePart, ScoreWarning } from "./types";
import { isInstrumentName, isVocalName } from "./vocal-name";

const SHOWN_BARS = 8;

const ROAD_MAP = {
  structure:
    "Its repeats and jumps are not clear, so figures are given for the music as printed only. Check the repeats by hand.",
  "too-long":
    "Its repeats add up to more bars than any performance has, so figures are given for the music as printed only.",
} as const;

function shorten(name: string, warnings: ScoreWarning[]): string {
  if (name.length <= LIMITS.nameCharacters) return name;
  warnings.push({
    code: "score.name-cut",
    message: `A name longer than ${String(LIMITS.nameCharacters)} characters was cut.`,
  });
  const cut = name.slice(0, LIMITS.nameCharacters);
  // Never half of a character that takes two places.
  return cut.replace(/[\uD800-\uDBFF]$/, "");
}

function looksVocal(reader: PartReader, name: string): boolean {
  if (isInstrumentName(name)) return false;
  return reader.lyrics > 0 || (reader.staves === 1 && isVocalName(name));
}

function readPart(
  reader: PartReader,
  given: string | undefined,
  times: readonly number[] | null,
): ScorePart {
  const warnings = [...reader.warnings.values()];
  const name = shorten(given === undefined || given === "" ? reader.id || "Part" : given, warnings);
  const { sung, withOptional, spoken } = reader;
  if (given === undefined) {
    warnings.push({
      code: "score.part-not-listed",
      message: "This part is not in the score's list of parts; it is kept under its id.",
    });
  }
  if (spoken) {
    warnings.push({
      code: "score.spoken",
      message: `${String(spoken.notes)} notes with an x or no notehead are taken as spoken and left out of the range (${spoken.low.spelling}–${spoken.high.spelling}).`,
    });
  }
  if (!sung && withOptional) {
    warnings.push({
      code: "score.cues-only",
      message: "Every note of this part is a cue note, so nothing of it counts as sung.",
    });
  }
  return {
    id: reader.id,
    name,
    vocal: looksVocal(reader, name),
    lyrics: reader.lyrics,
    staves: reader.staves,
    low: sung?.low ?? null,
    high: sung?.high ?? null,
    lowWithOptional: withOptional?.low ?? null,
    highWithOptional: withOptional?.high ?? null,
    spoken,
    written: sung ? lineFigures(reader.measures) : null,
    performed: sung && times ? lineFigures(reader.measures, times) : null,
    warnings,
  };
}

function listBars(bars: readonly BarLength[]): string {
  const shown = bars.slice(0, SHOWN_BARS).map(({ number }) => number.slice(0, 12));
  const more = bars.length - shown.length;
  return shown.join(", ") + (more > 0 ? ` and ${String(more)} more` : "");
}

/**
 * Bars longer than their time signature, and shorter ones that nothing explains: not the first, the
 * last, one at a repeat or Fine, or one that goes on in the next.
 */
function unevenBars(bars: readonly BarLength[], signs: readonly RoadSigns[]): ScoreWarning[] {
  const long = bars.filter((bar) => bar.nominal && compare(bar.quarters, bar.nominal) > 0);
  const isSplit = (index: number) =>
    index === 0 ||
    index === bars.length - 1 ||
    (bars[index]?.implicit ?? false) ||
    (bars[index + 1]?.implicit ?? false) ||
    (signs[index]?.forward ?? false) ||
    (signs[index + 1]?.forward ?? false) ||
    (signs[index]?.fine ?? false) ||
    signs[index]?.backward !== null;
  const short = bars.filter(
    (bar, index) => bar.nominal && compare(bar.quarters, bar.nominal) < 0 && !isSplit(index),
  );
  const warnings: ScoreWarning[] = [];
  if (long.length > 0) {
    warnings.push({
      code: "score.bars-too-long",
      message: `Longer than their time signature: bars ${listBars(long)}. Durations are kept as written.`,
    });
  }
  if (short.length > 0) {
    warnings.push({
      code: "score.bars-too-short",
      message: `Shorter than their time signature: bars ${listBars(short)}. Durations are kept as written.`,
    });
  }
  return warnings;
}

function roadMapWarnings(map: RoadMap): ScoreWarning[] {
  if (map.order === null) return [{ code: "score.road-map", message: ROAD_MAP[map.reason] }];
  if (map.jumps < 2) return [];
  return [
    {
      code: "score.several-jumps",
      message: "The score jumps back more than once; each jump is taken once. Check the order.",
    },
  ];
}

/**
 * Reads a MusicXML score (3 or 4, by parts or by bars, plain or compressed, any declared encoding).
 * In: the file's bytes, and its name, used as the title when the score has none.
 * Out: ranges, figures and structure of every part, see `ParsedScore`; oddities come as warnings.
 * Throws a ScoreError, whose message can be shown, when the score cannot be read. Nothing is fetched
 * or written.
 */
export function readScore(bytes: Uint8Array, fileName: string): ParsedScore {
  const { text, warnings } = openScore(bytes);
  const read = readParts(text);
  const measures = read.parts.map((part) => part.measures);
  const signs = mergeSigns(measures);
  const map = performedOrder(signs);
  const bars = barLengths(measures);
  const inOrder = bars.map((_, index) => index);
  let times: number[] | null = null;
  if (map.order) {
    times = bars.map(() => 0);
    for (const index of map.order) times[index] = (times[index] ?? 0) + 1;
  }
  if (measures.some(({ length }) => length !== bars.length)) {
    warnings.push({
      code: "score.unequal-parts",
      message: "The parts do not all have the same number of bars. Check the ends of the parts.",
    });
  }
  warnings.push(...unevenBars(bars, signs), ...roadMapWarnings(map));
  const parts = read.parts.map((part) => readPart(part, read.names.get(part.id), times));
  // A song sheet is often left under the name of an instrument.
  if (!parts.some(({ vocal }) => vocal)) for (const part of parts) part.vocal = part.lyrics > 0;
  const leading = read.parts[parts.findIndex(({ vocal }) => vocal)] ?? read.parts[0];
  const tempi = measures.flatMap((list) =>
    list.flatMap(({ tempi: some }, at) => some.map((one) => ({ ...one, bar: at }))),
  );
  tempi.sort((a, b) => a.bar - b.bar || compare(a.at, b.at));
  // A movement of no larger work is the work.
  const movement = read.title === null || read.movement === read.title ? null : read.movement;
  const title = read.title ?? read.movement ?? fileName.replace(/\.[^.]*$/, "");
  return {
    title: title === "" ? null : shorten(title, warnings),
    movement: movement === null ? null : shorten(movement, warnings),
    composer: read.composer === null ? null : shorten(read.composer, warnings),
    measures: { written: bars.length, performed: map.order?.length ?? null },
    keys:
      leading?.measures.flatMap(({ number, keys }) =>
        keys.map((fifths) => ({ measure: number, fifths })),
      ) ?? [],
    metre: read.parts.find(({ metre }) => metre !== null)?.metre ?? null,
    tempo: tempi[0]?.quartersPerMinute ?? null,
    length: {
      written: totalLength(bars, inOrder),
      performed: map.order ? totalLength(bars, map.order) : null,
    },
    order: map.order,
    parts,
    warnings,
  };
}
