import { RehearsalMark } from "@/components/layout/rehearsal-mark";
import { clock, formatDuration } from "@/components/ui/format-duration";
import { percent } from "@/components/music/keyboard-geometry";

export type LadderBlock = {
  id: string;
  title: string;
  /** The number in the score, as printed. */
  number?: string;
  /** Minutes after midnight. */
  start: number;
  minutes: number;
};

export type LadderRow = {
  id: string;
  name: string;
  sub?: string;
  /** Blocks this person or role is needed in. */
  blockIds: readonly string[];
};

export type CallLadderProps = {
  /** Names the drawing, for instance "Music call, Tuesday 6 April". */
  label: string;
  /** In running order. */
  blocks: readonly LadderBlock[];
  rows: readonly LadderRow[];
  breaks?: readonly { start: number; minutes: number; label?: string }[];
};

/** The stretches between somebody's first and last block in which they are not needed, in order. */
export function waitingOf(
  blocks: readonly LadderBlock[],
  blockIds: readonly string[],
): { start: number; minutes: number }[] {
  const needed = blocks.filter(({ id }) => blockIds.includes(id));
  const first = needed[0];
  const last = needed.at(-1);
  if (!first || !last) return [];
  return blocks
    .filter(
      (block) =>
        block.start > first.start && block.start < last.start && !blockIds.includes(block.id),
    )
    .map(({ start, minutes }) => ({ start, minutes }));
}

/** One call: blocks across in proportion to their minutes, black where someone sings, hatched where they wait. */
export function CallLadder({ label, blocks, rows, breaks = [] }: CallLadderProps) {
  const first = blocks[0];
  const last = blocks.at(-1);
  if (!first || !last) return null;
  const whole = Math.max(1, last.start + last.minutes - first.start);
  const place = ({ start, minutes }: { start: number; minutes: number }) => ({
    left: percent((start - first.start) / whole),
    width: percent(minutes / whole),
  });
  // The shortest block must still hold its mark and its minutes.
  const shortest = Math.min(...blocks.map(({ minutes }) => Math.max(1, minutes)));
  const minWidth = `${String(Math.min(2400, Math.max(480, Math.round((88 / shortest) * whole))))}px`;
  const name = (id: string) => blocks.find((block) => block.id === id);

  return (
    <div
      role="region"
      aria-label={`${label}; scrolls sideways`}
      tabIndex={0}
      className="overflow-x-auto print:overflow-visible"
    >
      <div className="grid w-full grid-cols-[8rem_minmax(0,1fr)] md:grid-cols-[12rem_minmax(0,1fr)]">
        <div className="sticky left-0 z-10 bg-paper">
          <div className="h-28" />
          <ul>
            {rows.map((row) => {
              const waits = waitingOf(blocks, row.blockIds).reduce((sum, w) => sum + w.minutes, 0);
              const sings = row.blockIds.flatMap((id) => {
                const block = name(id);
                return block ? [`${block.number ?? ""} ${block.title}`.trim()] : [];
              });
              return (
                <li key={row.id} className="flex h-12 flex-col justify-center pr-2 leading-tight">
                  <span className="truncate text-sm font-bold text-ink">{row.name}</span>
                  {row.sub !== undefined && (
                    <span className="truncate text-xs text-ink-2">{row.sub}</span>
                  )}
                  <span className="sr-only">
                    {sings.length === 0 ? "not needed" : `needed in ${sings.join(", ")}`}
                    {waits > 0 ? `; waits ${formatDuration(waits)}` : ""}
                  </span>
                </li>
              );
            })}
          </ul>
        </div>
        <div style={{ minWidth }}>
          <div className="relative h-28">
            {breaks.map((pause) => (
              <p
                key={pause.start}
                style={{ left: place(pause).left }}
                className="absolute top-0 text-xs whitespace-nowrap text-ink-2"
              >
                {clock(pause.start)} {pause.label ?? "break"}, {formatDuration(pause.minutes)}
              </p>
            ))}
            <ol>
              {blocks.map((block) => (
                <li
                  key={block.id}
                  style={place(block)}
                  className="absolute top-6 h-[4.5rem] pr-0.5"
                >
                  <div className="h-full overflow-hidden border border-ink bg-sheet px-2 py-1.5">
                    <div className="flex items-center justify-between gap-1">
                      {block.number !== undefined && <RehearsalMark>{block.number}</RehearsalMark>}
                      <span className="text-xs text-ink-2">
                        <span aria-hidden="true">{block.minutes}′</span>
                        <span className="sr-only">
                          {clock(block.start)}, {block.minutes} minutes
                        </span>
                      </span>
                    </div>
                    <p className="mt-1 line-clamp-2 font-serif text-base leading-none">
                      {block.title}
                    </p>
                  </div>
                </li>
              ))}
            </ol>
          </div>
          <div aria-hidden="true">
            {rows.map((row) => (
              <div key={row.id} className="relative h-12">
                {waitingOf(blocks, row.blockIds).map((wait) => (
                  <span
                    key={wait.start}
                    style={place(wait)}
                    className="absolute top-[1.125rem] h-3 hatched [--color-hatch:var(--color-ink-3)] print:border print:border-dashed"
                  />
                ))}
                {row.blockIds.map((id) => {
                  const block = name(id);
                  return (
                    block && (
                      <span key={id} style={place(block)} className="absolute top-2.5 h-7 pr-0.5">
                        <span className="block size-full rounded-[2px] bg-ink print:[print-color-adjust:exact]" />
                      </span>
                    )
                  );
                })}
              </div>
            ))}
          </div>
        </div>
      </div>
    </div>
  );
}
