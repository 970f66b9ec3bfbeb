import { RangeBar } from "@/components/music/range-bar";
import type { GridRole, GridSinger } from "@/lib/client/casting";

/** The drawing and the verdict of one singer in one role, or what is missing to give one. */
export function FitOfCell({
  singer,
  role,
  className,
}: {
  singer: GridSinger;
  role: GridRole;
  className?: string;
}) {
  const cell = singer.cells[role.id];
  if (!cell) return null;
  if (cell.verdict === null || !singer.range || !role.line) {
    return <span className="text-xs text-ink-2">{cell.words}</span>;
  }
  const { low, high, comfortableLow, comfortableHigh } = singer.range;
  return (
    <RangeBar
      role={role.line}
      singer={{
        low,
        high,
        comfortableLow: comfortableLow ?? undefined,
        comfortableHigh: comfortableHigh ?? undefined,
      }}
      verdict={cell.verdict}
      words={cell.words}
      {...(className !== undefined && { className })}
    />
  );
}
