import { octaveLooks } from "@/lib/score/octave-looks";
import type { OctaveLooks } from "@/lib/score/octave-looks";
import type { ScoreLine } from "@/lib/score/score-view";

export type LookingOff = { line: ScoreLine; looks: OctaveLooks };

/** The lines read from a score that look an octave off where they stand now. */
export function linesThatLookOff(lines: readonly ScoreLine[]): LookingOff[] {
  return lines.flatMap((line) => {
    const looks = line.partName === null ? null : octaveLooks(line.partName, line);
    return looks ? [{ line, looks }] : [];
  });
}
