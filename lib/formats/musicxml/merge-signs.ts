import { noSigns, type MeasureRecord, type RoadSigns } from "./measure-record";

/** A mark's label; a mark without one gives way to a labelled one. */
function label(kept: string | null, other: string | null): string | null {
  return kept === null || kept === "" ? (other ?? kept) : kept;
}

/**
 * The road map of the whole score: some programs write repeats and jumps into every part, some only
 * into the first, so a sign in any part counts for all.
 */
export function mergeSigns(parts: readonly (readonly MeasureRecord[])[]): RoadSigns[] {
  const bars = Math.max(0, ...parts.map((measures) => measures.length));
  return Array.from({ length: bars }, (_, index) => {
    const merged = noSigns();
    for (const measures of parts) {
      const signs = measures[index]?.signs;
      if (!signs) continue;
      merged.forward ||= signs.forward;
      merged.endingStop ||= signs.endingStop;
      merged.fine ||= signs.fine;
      merged.daCapo ||= signs.daCapo;
      merged.jumpInWords ||= signs.jumpInWords;
      merged.backward ??= signs.backward;
      merged.endingStart ??= signs.endingStart;
      merged.dalSegno ??= signs.dalSegno;
      merged.toCoda = label(merged.toCoda, signs.toCoda);
      merged.segno = label(merged.segno, signs.segno);
      merged.coda = label(merged.coda, signs.coda);
    }
    return merged;
  });
}
