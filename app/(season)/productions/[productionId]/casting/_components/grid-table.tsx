import type { KeyboardEvent, MouseEvent } from "react";
import { useGridKeys } from "@/components/casting/use-grid-keys";
import { cx } from "@/components/ui/cx";
import { SortIcon } from "@/components/ui/icons";
import { castIn, type Grid, type GridRole, type GridSinger } from "@/lib/client/casting";
import { pitchName } from "@/lib/music/pitch-name";
import { ChoiceOfCell } from "./choice-of-cell";
import { FitOfCell } from "./fit-of-cell";
import { AnswerGiven, RangeOnFile } from "./range-on-file";

export type Selected = { personId: string; roleId: string };

export type GridTableProps = {
  grid: Grid;
  /** Those shown, in the order they are shown. */
  singers: readonly GridSinger[];
  selected: Selected | null;
  /** `enter` when the keyboard asked to go to the details. */
  onSelect: (cell: Selected, enter: boolean) => void;
  sortedBy: string | null;
  onSort: (roleId: string | null) => void;
};

// Beyond five roles the words stand under the drawing, so that more columns fit side by side.
const ROOMY = 5;
// Up to eight fit beside the singers on a wide page, and the page itself scrolls.
const ALL_IN_VIEW = 8;

function RoleHead({
  role,
  cast,
  sorted,
  onSort,
  focus,
}: {
  role: GridRole;
  cast: number;
  sorted: boolean;
  onSort: () => void;
  focus: ReturnType<ReturnType<typeof useGridKeys>["cell"]>;
}) {
  return (
    <th
      role="columnheader"
      scope="col"
      aria-sort={sorted ? "ascending" : "none"}
      className="sticky top-0 z-10 border-b border-l border-rule bg-sheet px-3 pt-3 pb-2 align-bottom font-normal"
    >
      <span className="block font-serif text-xl leading-tight wrap-break-word text-ink">
        {role.name}
      </span>
      <span className="mt-0.5 block text-xs text-ink-2">
        {role.line ? `${pitchName(role.line.low)}–${pitchName(role.line.high)}` : "no line yet"}
      </span>
      {role.needed > 1 && (
        <span className="block text-xs text-ink-2">
          {cast} of {role.needed} cast
        </span>
      )}
      <button
        type="button"
        onClick={onSort}
        aria-label={sorted ? `In order of names again` : `Sort by fit for ${role.name}`}
        className={cx(
          "mt-1 -ml-1.5 inline-flex min-h-7 items-center gap-0.5 rounded-sm px-1.5 text-xs hover:bg-bone print:hidden",
          sorted ? "font-bold text-ink" : "text-ink-2",
        )}
        {...focus}
      >
        {sorted ? "by fit" : "sort"}
        <SortIcon direction={sorted ? "asc" : false} />
      </button>
    </th>
  );
}

/** The casting grid: roles across, singers down, one tab stop for all of it. */
export function GridTable({ grid, singers, selected, onSelect, sortedBy, onSort }: GridTableProps) {
  const roomy = grid.roles.length <= ROOMY;
  const keys = useGridKeys({ rows: singers.length, columns: grid.roles.length, heading: true });
  function press(event: KeyboardEvent, cell: Selected) {
    if (event.key !== "Enter" && event.key !== " ") return;
    event.preventDefault();
    onSelect(cell, event.key === "Enter");
  }

  return (
    <div className="@container">
      <div
        className={cx(
          "max-h-[max(26rem,calc(100dvh-2rem))] overflow-auto border-y-2 border-ink bg-sheet print:max-h-none print:overflow-visible",
          grid.roles.length <= ALL_IN_VIEW &&
            "@min-[60rem]:max-h-none @min-[60rem]:overflow-visible",
        )}
      >
        <table
          role="grid"
          aria-rowcount={singers.length + 1}
          onKeyDown={keys.onKeyDown}
          className="w-full border-separate border-spacing-0 text-left"
        >
          <caption className="sr-only">
            Singers against roles. Arrow keys move from cell to cell, space opens a cell beside the
            grid, Enter opens it and goes there.
          </caption>
          <thead>
            <tr>
              <th
                role="columnheader"
                scope="col"
                className="sticky top-0 left-0 z-20 w-44 min-w-44 border-b border-rule bg-sheet px-3 pt-3 pb-2 align-bottom font-normal"
              >
                <span className="small-caps">Singers: {singers.length}</span>
              </th>
              {grid.roles.map((role, column) => (
                <RoleHead
                  key={role.id}
                  role={role}
                  cast={castIn(grid, role.id)}
                  sorted={sortedBy === role.id}
                  onSort={() => onSort(sortedBy === role.id ? null : role.id)}
                  focus={keys.cell(-1, column)}
                />
              ))}
            </tr>
          </thead>
          <tbody>
            {singers.map((singer, row) => (
              <tr key={singer.personId} className="group">
                <th
                  role="rowheader"
                  scope="row"
                  className="sticky left-0 z-[5] border-b border-rule bg-sheet px-3 py-3 align-middle font-normal group-last:border-b-0"
                >
                  <span className="block leading-snug font-bold text-ink">{singer.name}</span>
                  <RangeOnFile range={singer.range} />
                  <span className="flex flex-wrap gap-x-2">
                    {singer.minor && <span className="text-xs text-ink-2">a minor</span>}
                    <AnswerGiven answer={singer.answer} />
                  </span>
                </th>
                {grid.roles.map((role, column) => {
                  const where = { personId: singer.personId, roleId: role.id };
                  const isSelected =
                    selected?.personId === where.personId && selected.roleId === where.roleId;
                  const choice = singer.cells[role.id]?.choice ?? null;
                  return (
                    <td
                      key={role.id}
                      role="gridcell"
                      aria-selected={isSelected}
                      onClick={(event: MouseEvent<HTMLTableCellElement>) => {
                        event.currentTarget.focus({ preventScroll: true });
                        onSelect(where, false);
                      }}
                      onKeyDown={(event) => press(event, where)}
                      className={cx(
                        "relative cursor-pointer scroll-mt-40 scroll-ml-48 border-b border-l border-rule align-middle -outline-offset-2 group-last:border-b-0",
                        roomy ? "h-28 min-w-36 px-3 py-2" : "h-36 min-w-24 px-3 py-2",
                        isSelected
                          ? "bg-bone shadow-[inset_0_0_0_2px_var(--color-ink)]"
                          : "hover:bg-paper",
                      )}
                      {...keys.cell(row, column)}
                    >
                      <span className={cx("flex", !roomy && "h-full flex-col items-start")}>
                        <FitOfCell
                          singer={singer}
                          role={role}
                          {...(!roomy && { className: "flex-col items-start! gap-1!" })}
                        />
                        {choice && (
                          <ChoiceOfCell
                            choice={choice}
                            className={roomy ? "absolute right-2 bottom-2" : "mt-auto"}
                          />
                        )}
                      </span>
                    </td>
                  );
                })}
              </tr>
            ))}
          </tbody>
        </table>
        {singers.length === 0 && (
          <p className="px-3 py-8 text-ink-2">Nobody matches. Try fewer letters.</p>
        )}
      </div>
    </div>
  );
}
