import type { SingerRange } from "@/lib/music/types";
import { cx } from "@/components/ui/cx";
import { KeyDrawing, type KeyTone } from "./key-drawing";
import { KeyLabels } from "./key-labels";
import { HIGHEST_KEY, LOWEST_KEY, layKeys } from "./keyboard-geometry";
import { rangeInWords } from "./range-in-words";

export type PitchKeyboardProps = {
  range: SingerRange;
  /** What the range is, for instance "Range heard"; begins the drawing's text. */
  label: string;
  /** First and last key drawn, MIDI; C2 to E6 unless told. */
  from?: number;
  to?: number;
  className?: string;
};

/** A range on a drawn keyboard: comfortable keys solid, the rest of the range paler. */
export function PitchKeyboard({
  range,
  label,
  from = LOWEST_KEY,
  to = HIGHEST_KEY,
  className,
}: PitchKeyboardProps) {
  const { low, high, comfortableLow = low, comfortableHigh = high } = range;
  const keyboard = layKeys(Math.min(from, low), Math.max(to, high));
  const tone = (midi: number): KeyTone => {
    if (midi < low || midi > high) return "plain";
    return midi < comfortableLow || midi > comfortableHigh ? "edge" : "in";
  };
  return (
    <div
      role="img"
      aria-label={`${label}: ${rangeInWords(range)}`}
      className={cx("max-w-3xl", className)}
    >
      <KeyDrawing keyboard={keyboard} tone={tone} className="h-14" />
      <KeyLabels keyboard={keyboard} pitches={[low, high]} />
    </div>
  );
}
