import { useId } from "react";

type Note = { x: number; y: number; open?: boolean };

// Positions are in the drawing's own units: a stave's lines are 15 apart, its top line at 0.
const STAVES: { top: number; notes: Note[] }[] = [
  {
    top: 14,
    notes: [
      { x: 62, y: 30, open: true },
      { x: 162, y: 0 },
      { x: 205, y: 15, open: true },
      { x: 257, y: 60 },
      { x: 302, y: 45 },
      { x: 343, y: 30 },
      { x: 398, y: 60 },
      { x: 445, y: 45 },
      { x: 485, y: 60, open: true },
      { x: 540, y: 15 },
      { x: 582, y: 60 },
      { x: 631, y: 0 },
    ],
  },
  {
    top: 164,
    notes: [
      { x: 22, y: 30 },
      { x: 62, y: 15 },
      { x: 114, y: 60 },
      { x: 161, y: 15 },
      { x: 256, y: 15 },
      { x: 300, y: 30 },
      { x: 489, y: 15 },
      { x: 540, y: 60 },
      { x: 586, y: 30 },
      { x: 629, y: 0 },
    ],
  },
  {
    top: 314,
    notes: [
      { x: 20, y: 45 },
      { x: 67, y: 30 },
      { x: 115, y: 60 },
      { x: 251, y: 15, open: true },
      { x: 396, y: 60 },
      { x: 439, y: 15, open: true },
      { x: 486, y: 15 },
      { x: 531, y: 0, open: true },
      { x: 587, y: 0 },
      { x: 634, y: 0 },
    ],
  },
];

/** A season as staves, with a clash circled: the work itself is the ornament, and says nothing that is not said in words. */
export function StaveOrnament({ className }: { className?: string }) {
  const id = useId();
  return (
    <svg viewBox="0 0 660 405" aria-hidden="true" className={className}>
      <defs>
        <linearGradient id={`${id}fade`} x1="0" x2="1">
          <stop offset="0" stopColor="#fff" stopOpacity="0" />
          <stop offset="0.35" stopColor="#fff" />
        </linearGradient>
        <mask id={`${id}fading`}>
          <rect width="660" height="405" fill={`url(#${id}fade)`} />
        </mask>
      </defs>
      <g mask={`url(#${id}fading)`}>
        {STAVES.map(({ top, notes }) => (
          <g key={top}>
            {[0, 1, 2, 3, 4].map((line) => (
              <line
                key={line}
                x1={0}
                x2={660}
                y1={top + line * 15}
                y2={top + line * 15}
                className="stroke-rule"
                strokeWidth={1.2}
              />
            ))}
            {notes.map(({ x, y, open }) => (
              <ellipse
                key={x}
                cx={x}
                cy={top + y}
                rx={open ? 8 : 9}
                ry={open ? 5 : 6.6}
                transform={`rotate(-18 ${String(x)} ${String(top + y)})`}
                className={open ? "fill-paper stroke-ink-2" : "fill-ink-2"}
                strokeWidth={open ? 2 : 0}
                opacity={0.75}
              />
            ))}
          </g>
        ))}
      </g>
      <rect
        x={353}
        y={2}
        width={34}
        height={400}
        rx={17}
        fill="none"
        className="stroke-vermilion"
        strokeWidth={2.6}
        opacity={0.55}
      />
    </svg>
  );
}
