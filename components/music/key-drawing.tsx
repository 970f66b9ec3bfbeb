import type { Keyboard } from "./keyboard-geometry";

/** What a key says by its colour; a label or sentence beside the drawing says it too. */
export type KeyTone = "plain" | "in" | "edge" | "core" | "out";

const fills: Record<KeyTone, { natural: string; sharp: string }> = {
  plain: { natural: "fill-natural", sharp: "fill-sharp" },
  in: { natural: "fill-key-in", sharp: "fill-key-in-sharp" },
  edge: { natural: "fill-key-edge", sharp: "fill-key-edge-sharp" },
  core: { natural: "fill-key-core", sharp: "fill-key-core-sharp" },
  out: { natural: "fill-key-out", sharp: "fill-key-out-sharp" },
};

const UNIT = 20;
const HEIGHT = 60;
const SHARP_HEIGHT = 35;

/** The keys alone: dark naturals, bone sharps, stretched to the width they are given. */
export function KeyDrawing({
  keyboard,
  tone,
  className,
}: {
  keyboard: Keyboard;
  tone: (midi: number) => KeyTone;
  className: string;
}) {
  const ordered = [
    ...keyboard.keys.filter((key) => !key.sharp),
    ...keyboard.keys.filter((key) => key.sharp),
  ];
  return (
    <svg
      viewBox={`0 0 ${String(keyboard.width * UNIT)} ${String(HEIGHT)}`}
      preserveAspectRatio="none"
      aria-hidden="true"
      className={`block w-full ${className}`}
    >
      {ordered.map((key) => (
        <rect
          key={key.midi}
          x={key.x * UNIT}
          y={0}
          width={key.width * UNIT}
          height={key.sharp ? SHARP_HEIGHT : HEIGHT}
          strokeWidth={1}
          vectorEffect="non-scaling-stroke"
          className={`${fills[tone(key.midi)][key.sharp ? "sharp" : "natural"]} ${
            key.sharp ? "stroke-sharp-line" : "stroke-natural-line"
          }`}
        />
      ))}
    </svg>
  );
}
