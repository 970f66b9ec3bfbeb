"use client";

import { useEffect, useId, useRef, useState, type KeyboardEvent, type MouseEvent } from "react";
import { pitchName } from "@/lib/music/pitch-name";
import { Button } from "@/components/ui/button";
import { cx } from "@/components/ui/cx";
import { KeyDrawing, type KeyTone } from "./key-drawing";
import { HIGHEST_KEY, LOWEST_KEY, layKeys, percent, type Key } from "./keyboard-geometry";

export type PickedRange = { low: number | null; high: number | null };

export type RangeKeyboardProps = {
  value: PickedRange;
  onChange: (value: PickedRange) => void;
  /** What range it is, for instance "The range you sing". */
  label: string;
  from?: number;
  to?: number;
  disabled?: boolean;
  /** Given by Field. */
  id?: string;
  "aria-describedby"?: string;
  "aria-invalid"?: boolean;
  onBlur?: () => void;
};

type End = "low" | "high";
const endName: Record<End, string> = { low: "Lowest note", high: "Highest note" };

// 30 px a natural: a fingertip finds it, and a sharp is still 24 px of reach with its margin.
const KEY_PX = 30;
const SHARP_REACH = 0.4;
const SHARP_DEPTH = 35 / 60;

/** The key under a point; x in natural keys, y as a share of the height. Sharps lie on top. */
export function keyAt(keys: readonly Key[], x: number, y: number): Key | undefined {
  const sharp =
    y <= SHARP_DEPTH
      ? keys.find((key) => key.sharp && Math.abs(key.x + key.width / 2 - x) <= SHARP_REACH)
      : undefined;
  return sharp ?? keys.find((key) => !key.sharp && x >= key.x && x < key.x + key.width);
}

/**
 * A range chosen on a keyboard: two taps, in either order, or two sliders for the keyboard (arrow
 * keys a semitone, page keys an octave). A form control with value and onChange.
 */
export function RangeKeyboard({
  value,
  onChange,
  label,
  from = LOWEST_KEY,
  to = HIGHEST_KEY,
  disabled = false,
  id,
  onBlur,
  ...aria
}: RangeKeyboardProps) {
  const hintId = useId();
  const scroller = useRef<HTMLDivElement>(null);
  /** The first of two taps, while the second is awaited. */
  const [first, setFirst] = useState<number | null>(null);
  const keyboard = layKeys(from, to);
  const { low, high } = value;
  const chosen = low !== null && high !== null;

  /** Scrolls a key into view, a little in from the edge; leaves the keys alone when it is in view. */
  function reveal(midi: number, always = false) {
    const box = scroller.current;
    if (!box) return;
    const x = layKeys(from, to).middle(midi) * box.scrollWidth;
    const inView = x > box.scrollLeft + KEY_PX && x < box.scrollLeft + box.clientWidth - KEY_PX;
    if (always || !inView) box.scrollLeft = x - box.clientWidth / 4;
  }

  useEffect(() => {
    // From the chosen lowest note, or the bottom of most voices, upwards.
    reveal(low ?? 52, true);
    // Only once: a keyboard that slides under the finger cannot be played.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, []);

  function tap(event: MouseEvent<HTMLDivElement>) {
    if (disabled) return;
    const box = event.currentTarget.getBoundingClientRect();
    const key = keyAt(
      keyboard.keys,
      ((event.clientX - box.left) / box.width) * keyboard.width,
      (event.clientY - box.top) / box.height,
    );
    if (!key) return;
    if (first === null) {
      setFirst(key.midi);
      return;
    }
    setFirst(null);
    onChange({ low: Math.min(first, key.midi), high: Math.max(first, key.midi) });
  }

  function move(end: End, wished: number) {
    setFirst(null);
    const pitch = Math.min(Math.max(Math.round(wished), from), to);
    reveal(pitch);
    if (end === "low") onChange({ low: high === null ? pitch : Math.min(pitch, high), high });
    else onChange({ low, high: low === null ? pitch : Math.max(pitch, low) });
  }

  const shown = (end: End) => (end === "low" ? (low ?? 55) : (high ?? 72));

  function pageKeys(end: End, event: KeyboardEvent<HTMLInputElement>) {
    const octave = event.key === "PageUp" ? 12 : event.key === "PageDown" ? -12 : 0;
    if (octave === 0) return;
    event.preventDefault();
    move(end, shown(end) + octave);
  }

  const tone = (midi: number): KeyTone => {
    if (first !== null) return midi === first ? "in" : "plain";
    if (low !== null && high !== null) return midi >= low && midi <= high ? "in" : "plain";
    return midi === low || midi === high ? "in" : "plain";
  };

  // Two names under neighbouring keys stand back to back instead of on each other.
  const near = keyboard.middle(shown("high")) - keyboard.middle(shown("low")) < 0.05;

  const state =
    first !== null
      ? `${pitchName(first)}. Now tap the other end of the range.`
      : chosen
        ? `${pitchName(low)} to ${pitchName(high)}`
        : "Tap your lowest note, then your highest.";

  return (
    <div role="group" aria-label={label} className="max-w-4xl min-w-0">
      <div
        ref={scroller}
        className={cx(
          "w-full overflow-x-auto pb-1 contain-inline-size",
          aria["aria-invalid"] && "outline-2 outline-vermilion",
          disabled && "opacity-55",
        )}
      >
        <div className="relative" style={{ width: `${String(keyboard.width * KEY_PX)}px` }}>
          {/* The keys answer fingers and mouse; the two sliders below answer everything else. */}
          <div onClick={tap} className={cx("select-none", !disabled && "cursor-pointer")}>
            <KeyDrawing keyboard={keyboard} tone={tone} className="h-20" />
          </div>
          <div className="relative mt-1 h-8">
            {(["low", "high"] as const).map((end) => {
              const pitch = value[end];
              return (
                <span key={end}>
                  <input
                    type="range"
                    min={from}
                    max={to}
                    step={1}
                    value={shown(end)}
                    disabled={disabled}
                    {...(end === "low" && id !== undefined && { id })}
                    aria-label={endName[end]}
                    aria-valuetext={pitch === null ? "not chosen" : pitchName(pitch)}
                    aria-describedby={[aria["aria-describedby"], hintId].filter(Boolean).join(" ")}
                    {...(aria["aria-invalid"] && { "aria-invalid": true })}
                    onChange={(event) => {
                      move(end, event.currentTarget.valueAsNumber);
                    }}
                    onKeyDown={(event) => {
                      pageKeys(end, event);
                    }}
                    onFocus={() => {
                      reveal(shown(end));
                    }}
                    onBlur={onBlur}
                    className="peer pointer-events-none absolute inset-0 m-0 h-full w-full opacity-0"
                  />
                  <span
                    aria-hidden="true"
                    style={{ left: percent(keyboard.middle(shown(end))) }}
                    className={cx(
                      "pointer-events-none absolute top-0 rounded-sm border px-1.5 text-xs leading-6 peer-focus-visible:outline-2 peer-focus-visible:outline-offset-2 peer-focus-visible:outline-smalt",
                      !near ? "-translate-x-1/2" : end === "low" && "-translate-x-full",
                      pitch === null
                        ? "border-dashed border-ink-3 bg-sheet text-ink-2"
                        : "border-ink bg-sheet font-bold text-ink",
                    )}
                  >
                    {pitch === null ? (end === "low" ? "low?" : "high?") : pitchName(pitch)}
                  </span>
                </span>
              );
            })}
          </div>
        </div>
      </div>
      <div className="mt-1 flex min-h-11 flex-wrap items-center gap-x-3">
        <p
          aria-live="polite"
          className={cx("text-sm", chosen ? "font-bold text-ink" : "text-ink-2")}
        >
          {state}
        </p>
        {(low !== null || high !== null || first !== null) && !disabled && (
          <Button
            kind="quiet"
            size="small"
            onClick={() => {
              setFirst(null);
              onChange({ low: null, high: null });
            }}
          >
            Choose again
          </Button>
        )}
      </div>
      <p id={hintId} className="sr-only">
        Arrow keys move by a semitone, page up and page down by an octave.
      </p>
    </div>
  );
}
