import { pitchName } from "@/lib/music/pitch-name";
import type { PitchSpan } from "@/lib/music/types";
import { cx } from "@/components/ui/cx";

export type LineOnScaleProps = PitchSpan & {
  tessitura?: PitchSpan | null;
  /** The pitches at the left and right end; share one over a column, so that lines compare. */
  scale: PitchSpan;
  /** Fifths of the number's key, so that pitches are spelled as its score spells them. */
  fifths?: number;
  className?: string;
};

const HEIGHT = 12;
const MIDDLE = HEIGHT / 2;

/** One vocal line on a pitch scale that runs from left (low) to right (high). */
export function LineOnScale({
  low,
  high,
  tessitura,
  scale,
  fifths = 0,
  className,
}: LineOnScaleProps) {
  const unit = 4;
  const width = Math.max(1, scale.high - scale.low + 1) * unit;
  const left = (midi: number) => (midi - scale.low) * unit;
  const right = (midi: number) => (midi - scale.low + 1) * unit;
  const name = (midi: number) => pitchName(midi, { prefer: fifths });
  const words = `${name(low)} to ${name(high)}${
    tessitura ? `, mostly ${name(tessitura.low)} to ${name(tessitura.high)}` : ""
  }`;
  return (
    <svg
      role="img"
      aria-label={words}
      viewBox={`0 0 ${String(width)} ${String(HEIGHT)}`}
      className={cx("block h-3 w-full max-w-40 min-w-20 text-ink", className)}
    >
      <title>{words}</title>
      <line
        x1={left(low) + 1}
        x2={right(high) - 1}
        y1={MIDDLE}
        y2={MIDDLE}
        stroke="currentColor"
        strokeWidth={2}
        strokeLinecap="round"
      />
      {tessitura && (
        <rect
          x={left(tessitura.low)}
          y={MIDDLE - 4.5}
          width={right(tessitura.high) - left(tessitura.low)}
          height={9}
          rx={4.5}
          fill="currentColor"
        />
      )}
    </svg>
  );
}
