import { formatLength } from "@/lib/score/number-length";
import type { ScoreLine, ScoreNumber } from "@/lib/score/score-view";

/** "1:20 of 3:20": how long a role sings in a number at its first tempo, of how much music; what is not known is left out. */
export function sungTime(lines: readonly ScoreLine[], number: ScoreNumber): string {
  const whole = number.seconds === null ? "" : formatLength(number.seconds);
  // Several lines of one role (a divided chorus) sing at the same time: the longest of them counts.
  const quarters = Math.max(
    ...lines.map((line) =>
      Object.values(line.histogram ?? {}).reduce((sum, each) => sum + each, 0),
    ),
    0,
  );
  if (quarters === 0 || number.tempo === null) return whole === "" ? "" : `in ${whole}`;
  const sung = formatLength((quarters / number.tempo) * 60);
  return whole === "" ? sung : `${sung} of ${whole}`;
}
