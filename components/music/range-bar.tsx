import { pitchName } from "@/lib/music/pitch-name";
import type { FitVerdict, PitchSpan, SingerRange } from "@/lib/music/types";
import { cx } from "@/components/ui/cx";
import { rangeInWords } from "./range-in-words";

export type RangeBarProps = {
  role: PitchSpan & { tessitura?: PitchSpan | null };
  singer: SingerRange;
  verdict: FitVerdict;
  /** The verdict in words, for instance "2 short at top". */
  words: string;
  /** The pitches at the foot and the head of the drawing; those of both ranges unless told. */
  scale?: PitchSpan;
  className?: string;
};

const colour: Record<FitVerdict, string> = {
  fits: "text-verdigris",
  stretch: "text-ochre",
  out: "text-vermilion",
};

// Beyond half an octave nobody weighs it up: the drawing steps back, the words stay readable.
const FAR = 6;

const WIDTH = 54;
const HEIGHT = 64;
const ROLE = { x: 9, width: 16 };
const SINGER = { x: 38, width: 10 };

/** A role's range beside a singer's on one semitone scale, with the verdict in words. */
export function RangeBar({ role, singer, verdict, words, scale, className }: RangeBarProps) {
  const foot = scale?.low ?? Math.min(role.low, singer.low) - 2;
  const head = scale?.high ?? Math.max(role.high, singer.high) + 2;
  // A pitch is a band one semitone high: `top` is its upper edge, `bottom` its lower one.
  const semitone = HEIGHT / (head - foot + 1);
  const top = (midi: number) => (head - midi) * semitone;
  const bottom = (midi: number) => (head - midi + 1) * semitone;
  const { comfortableLow = singer.low, comfortableHigh = singer.high } = singer;
  const shortAbove = Math.max(0, role.high - singer.high);
  const shortBelow = Math.max(0, singer.low - role.low);
  const far = Math.max(shortAbove, shortBelow) > FAR;
  const octaves = Array.from({ length: 9 }, (_, index) => 12 * (index + 1)).filter(
    (c) => c > foot && c < head,
  );
  const spoken = `${words}. Role ${pitchName(role.low)}–${pitchName(role.high)}, singer ${rangeInWords(singer)}.`;
  return (
    <span className={cx("flex items-center gap-2", colour[verdict], className)}>
      <svg
        viewBox={`0 0 ${String(WIDTH)} ${String(HEIGHT)}`}
        width={WIDTH}
        height={HEIGHT}
        role="img"
        aria-label={spoken}
        className={cx("shrink-0", far && "opacity-45")}
      >
        <title>{spoken}</title>
        {octaves.map((c) => (
          <line
            key={c}
            x1={0}
            x2={WIDTH}
            y1={bottom(c)}
            y2={bottom(c)}
            strokeWidth={1}
            className="stroke-rule"
          />
        ))}
        <rect
          x={ROLE.x}
          y={top(role.high)}
          width={ROLE.width}
          height={bottom(role.low) - top(role.high)}
          strokeWidth={1.25}
          className="fill-sheet stroke-ink"
        />
        {role.tessitura && (
          <rect
            x={ROLE.x}
            y={top(role.tessitura.high)}
            width={ROLE.width}
            height={bottom(role.tessitura.low) - top(role.tessitura.high)}
            className="fill-ink"
          />
        )}
        <line
          x1={SINGER.x}
          x2={SINGER.x}
          y1={top(singer.high)}
          y2={bottom(singer.low)}
          stroke="currentColor"
          strokeWidth={2}
        />
        <rect
          x={SINGER.x - SINGER.width / 2}
          y={top(comfortableHigh)}
          width={SINGER.width}
          height={bottom(comfortableLow) - top(comfortableHigh)}
          rx={4}
          fill="currentColor"
        />
        {[shortAbove > 0 ? top(role.high) : null, shortBelow > 0 ? bottom(role.low) : null].map(
          (y) =>
            y !== null && (
              <line
                key={y}
                x1={SINGER.x - 8}
                x2={SINGER.x + 8}
                y1={y}
                y2={y}
                strokeWidth={1.5}
                strokeDasharray="3 2"
                className="stroke-vermilion"
              />
            ),
        )}
      </svg>
      <span
        aria-hidden="true"
        className={cx("min-w-16 text-xs leading-snug", far ? "text-ink-2" : "font-bold")}
      >
        {words}
      </span>
    </span>
  );
}
