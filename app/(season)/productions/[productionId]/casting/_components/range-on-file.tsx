import { pitchName } from "@/lib/music/pitch-name";
import type { PitchSpan } from "@/lib/music/types";

/** "A3–C6 · heard", or that there is no range yet. */
export function RangeOnFile({
  range,
}: {
  range: (PitchSpan & { kind: "claimed" | "heard" }) | null;
}) {
  return (
    <span className="text-sm text-ink-2">
      {range
        ? `${pitchName(range.low)}–${pitchName(range.high)} · ${range.kind}`
        : "no range on file"}
    </span>
  );
}

const ANSWERS = { yes: "will come", no: "can’t come" };

/** What the singer answered to the callback. */
export function AnswerGiven({ answer }: { answer: "yes" | "no" | null }) {
  if (!answer) return null;
  return (
    <span className={answer === "no" ? "text-xs font-bold text-vermilion" : "text-xs text-ink-2"}>
      {ANSWERS[answer]}
    </span>
  );
}
