export const eventKinds = [
  "audition",
  "callback",
  "music",
  "staging",
  "orchestra",
  "tech",
  "performance",
] as const;

export type EventKind = (typeof eventKinds)[number];

export const eventKindName: Record<EventKind, string> = {
  audition: "Audition",
  callback: "Callback",
  music: "Music call",
  staging: "Staging call",
  orchestra: "Orchestra, sitzprobe",
  tech: "Tech, dress",
  performance: "Performance",
};

/** The notehead of a kind of call, drawn around (x, y) in the current colour. */
export function NoteShape({ kind, x, y }: { kind: EventKind; x: number; y: number }) {
  const tilt = `rotate(-20 ${x.toFixed(1)} ${y.toFixed(1)})`;
  switch (kind) {
    case "audition":
      return (
        <ellipse
          cx={x}
          cy={y}
          rx={5}
          ry={3.6}
          transform={tilt}
          className="fill-paper"
          stroke="currentColor"
          strokeWidth={1.6}
        />
      );
    case "callback":
      return (
        <path
          d={`M${String(x - 6)} ${String(y)}l6-6 6 6-6 6z`}
          className="fill-paper"
          stroke="currentColor"
          strokeWidth={1.6}
        />
      );
    case "music":
      return <ellipse cx={x} cy={y} rx={5.6} ry={4} transform={tilt} fill="currentColor" />;
    case "staging":
      return <rect x={x - 4.5} y={y - 4.5} width={9} height={9} fill="currentColor" />;
    case "orchestra":
      return <path d={`M${String(x)} ${String(y - 5.5)}l5.5 10h-11z`} fill="currentColor" />;
    case "tech":
      return (
        <path
          d={`M${String(x - 4.5)} ${String(y - 4.5)}l9 9m0-9l-9 9`}
          stroke="currentColor"
          strokeWidth={2.2}
        />
      );
    case "performance":
      return (
        <ellipse
          cx={x}
          cy={y}
          rx={7}
          ry={4.4}
          className="fill-paper"
          stroke="currentColor"
          strokeWidth={2.4}
        />
      );
  }
}
