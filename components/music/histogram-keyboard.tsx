import { pitchName } from "@/lib/music/pitch-name";
import type { Histogram, PitchSpan } from "@/lib/music/types";
import { cx } from "@/components/ui/cx";
import { KeyDrawing, type KeyTone } from "./key-drawing";
import { KeyLabels } from "./key-labels";
import { layKeys, percent } from "./keyboard-geometry";

export type HistogramKeyboardProps = {
  /** Sung time by pitch; only the proportions are drawn. */
  histogram: Histogram;
  low: number;
  high: number;
  /** Where most of the singing lies; its bars and keys are solid. */
  tessitura?: PitchSpan | null;
  /** What this is, for instance "What Maren sings"; begins the drawing's text. */
  label: string;
  className?: string;
};

/** What a line sings: bars of sung time standing on the keys they belong to. */
export function HistogramKeyboard({
  histogram,
  low,
  high,
  tessitura,
  label,
  className,
}: HistogramKeyboardProps) {
  const keyboard = layKeys(low - 5, high + 5);
  const bars = Object.entries(histogram)
    .map(([pitch, time]) => ({ midi: Number(pitch), time }))
    .filter(({ midi, time }) => Number.isFinite(midi) && time > 0);
  const longest = Math.max(...bars.map(({ time }) => time), Number.MIN_VALUE);
  const total = bars.reduce((sum, { time }) => sum + time, 0);
  const top = bars.toSorted((a, b) => b.time - a.time)[0];
  const within = (midi: number) => !!tessitura && midi >= tessitura.low && midi <= tessitura.high;
  const tone = (midi: number): KeyTone => {
    if (midi < low || midi > high) return "out";
    return within(midi) ? "core" : "plain";
  };
  const words = [
    `${label}: ${pitchName(low)} to ${pitchName(high)}`,
    tessitura ? `mostly ${pitchName(tessitura.low)} to ${pitchName(tessitura.high)}` : "",
    top
      ? `longest on ${pitchName(top.midi)}, ${String(Math.round((top.time / total) * 100))} % of the sung time`
      : "",
  ];
  return (
    <div
      role="img"
      aria-label={words.filter(Boolean).join("; ")}
      className={cx("max-w-xl", className)}
    >
      <div className="relative h-28">
        {bars.map(({ midi, time }) => (
          <span
            key={midi}
            style={{
              left: percent(keyboard.middle(midi)),
              height: percent(Math.max(time / longest, 0.02)),
              width: percent(0.44 / keyboard.width),
            }}
            className={cx(
              "absolute bottom-0.5 -translate-x-1/2 print:border print:border-black",
              within(midi) ? "bg-ink" : "bg-bar-quiet",
            )}
          />
        ))}
      </div>
      <KeyDrawing keyboard={keyboard} tone={tone} className="h-13" />
      <KeyLabels keyboard={keyboard} pitches={[low, high]} />
    </div>
  );
}
