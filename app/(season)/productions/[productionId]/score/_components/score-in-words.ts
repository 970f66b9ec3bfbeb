import { formatDuration } from "@/components/ui/format-duration";
import type { ScoreView } from "@/lib/score/score-view";

const count = (n: number, word: string): string => `${String(n)} ${word}${n === 1 ? "" : "s"}`;

/** "21 numbers, 6 roles, 1 h 12 of music. 40 lines were read from scores, 3 were typed in." */
export function scoreInWords(view: ScoreView): string {
  const minutes = view.numbers.reduce((sum, number) => sum + (number.seconds ?? 0), 0) / 60;
  const size = [count(view.numbers.length, "number"), count(view.roles.length, "role")];
  if (minutes >= 1) size.push(`${formatDuration(minutes)} of music`);
  const unknown = view.numbers.filter((number) => number.seconds === null).length;
  const read = view.lines.filter((line) => line.source === "read").length;
  const typed = view.lines.length - read;
  const sentences = [`${size.join(", ")}.`];
  if (unknown > 0 && unknown < view.numbers.length) {
    sentences.push(`${count(unknown, "number")} ${unknown === 1 ? "has" : "have"} no length yet.`);
  }
  if (read > 0 && typed > 0) {
    sentences.push(`${count(read, "line")} read from scores, ${String(typed)} typed in.`);
  } else if (view.lines.length > 0) {
    sentences.push(
      `${count(view.lines.length, "line")}, ${read > 0 ? "read from scores" : "typed in"}.`,
    );
  }
  return sentences.join(" ");
}
