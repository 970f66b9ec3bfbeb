import { pitchName } from "@/lib/music/pitch-name";
import { cx } from "@/components/ui/cx";
import { percent, type Keyboard } from "./keyboard-geometry";

// Nearer than this, as a share of the width, two names would run into each other.
const TOO_NEAR = 0.1;

function labels(keyboard: Keyboard, pitches: readonly number[]): { text: string; at: number }[] {
  const placed = [...new Set(pitches)].map((midi) => ({
    text: pitchName(midi),
    at: keyboard.middle(midi),
  }));
  const [first, second] = placed;
  if (placed.length !== 2 || !first || !second || second.at - first.at >= TOO_NEAR) return placed;
  return [{ text: `${first.text}–${second.text}`, at: (first.at + second.at) / 2 }];
}

/**
 * Names under keys, at their real size whatever the drawing is stretched to. Hidden from screen
 * readers, because the drawing's own text says them.
 */
export function KeyLabels({
  keyboard,
  pitches,
}: {
  keyboard: Keyboard;
  pitches: readonly number[];
}) {
  return (
    <div aria-hidden="true" className="relative mt-1 h-5 text-xs text-ink-2">
      {labels(keyboard, pitches).map(({ text, at }) => (
        <span
          key={text}
          style={{ left: percent(at) }}
          className={cx(
            "absolute top-0 leading-5 whitespace-nowrap",
            at > 0.96 ? "-translate-x-full" : at >= 0.04 && "-translate-x-1/2",
          )}
        >
          {text}
        </span>
      ))}
    </div>
  );
}
