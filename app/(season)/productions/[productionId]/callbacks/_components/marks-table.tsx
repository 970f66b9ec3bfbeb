import { useGridKeys } from "@/components/casting/use-grid-keys";
import { Button } from "@/components/ui/button";
import { cx } from "@/components/ui/cx";
import type { Draft, DraftRole, DraftSinger } from "@/lib/client/callbacks";
import { pitchName } from "@/lib/music/pitch-name";
import { AnswerCell } from "./answer-cell";
import { SingerHead } from "./singer-head";
import { MarkCell, TickCell } from "./tick-cell";
import type { Mark } from "./use-marks";

const headClass =
  "sticky top-0 z-10 border-b border-rule bg-sheet px-3 pt-3 pb-2 align-bottom font-normal";
// On phones a row is a card: the singer, then the roles side by side.
const cellClass =
  "border-b border-rule align-top group-last:border-b-0 max-md:block max-md:border-b-0";

export type MarksTableProps = {
  draft: Draft;
  singers: readonly DraftSinger[];
  /** The roles in view, a part of the draft's. */
  roles: readonly DraftRole[];
  onMark: (mark: Mark) => void;
  onHear: (singer: DraftSinger) => void;
};

/** Singers against roles with a box to tick for each; one tab stop, arrow keys between the boxes. */
export function MarksTable({ draft, singers, roles, onMark, onHear }: MarksTableProps) {
  const published = (draft.round?.issue ?? 0) > 0;
  const keys = useGridKeys({ rows: singers.length, columns: roles.length + 1 });
  return (
    <div className="max-h-[max(26rem,calc(100dvh-2rem))] scroll-pt-24 scroll-pl-56 overflow-auto border-y-2 border-ink bg-sheet max-md:max-h-none print:max-h-none print:overflow-visible">
      <table
        ref={keys.table}
        role="grid"
        onKeyDown={keys.onKeyDown}
        className="w-full border-separate border-spacing-0 text-left max-md:block"
      >
        <caption className="sr-only">
          Who is called back for what. Arrow keys move between the boxes, space ticks one.
        </caption>
        <thead role="rowgroup" className="max-md:sr-only">
          <tr role="row">
            <th
              role="columnheader"
              scope="col"
              className={cx(headClass, "left-0 z-20 w-52 min-w-52")}
            >
              <span className="small-caps">Singers: {singers.length}</span>
            </th>
            {roles.map((role) => (
              <th
                key={role.id}
                role="columnheader"
                scope="col"
                className={cx(headClass, "border-l")}
              >
                <span className="block font-serif text-xl leading-tight [overflow-wrap:anywhere] text-ink">
                  {role.name}
                </span>
                <span className="mt-0.5 block text-xs text-ink-2">
                  {role.line
                    ? `${pitchName(role.line.low)}–${pitchName(role.line.high)}`
                    : "no line yet"}
                </span>
              </th>
            ))}
            {published && (
              <th role="columnheader" scope="col" className={cx(headClass, "border-l")}>
                <span className="small-caps">Answer</span>
              </th>
            )}
          </tr>
        </thead>
        <tbody role="rowgroup" className="max-md:block">
          {singers.map((singer, row) => (
            <tr
              key={singer.personId}
              role="row"
              className="group max-md:block max-md:border-b max-md:border-rule max-md:py-2 max-md:last:border-b-0"
            >
              <th
                role="rowheader"
                scope="row"
                className={cx(
                  cellClass,
                  "sticky left-0 z-[5] bg-sheet px-3 py-2.5 font-normal max-md:static",
                )}
              >
                <SingerHead singer={singer} />
                {draft.mayHear && !singer.withdrawn && (
                  <Button
                    kind="quiet"
                    size="small"
                    className="mt-0.5 -ml-3 print:hidden"
                    aria-label={`Write the range heard from ${singer.name}`}
                    onClick={() => onHear(singer)}
                    {...keys.cell(row, 0)}
                  >
                    Range heard
                  </Button>
                )}
              </th>
              {roles.map((role, index) => {
                const fit = singer.fits[draft.roles.indexOf(role)] ?? { verdict: null, words: "" };
                const on = singer.marks.includes(role.id);
                return (
                  <td
                    key={role.id}
                    role="gridcell"
                    className={cx(
                      cellClass,
                      "h-px min-w-24 border-l max-md:inline-block max-md:w-1/2 max-md:border-l-0",
                    )}
                  >
                    {draft.may.mark && !(singer.withdrawn && !on) ? (
                      <TickCell
                        singer={singer}
                        role={role}
                        fit={fit}
                        on={on}
                        onChange={(now) =>
                          onMark({ personId: singer.personId, roleId: role.id, on: now })
                        }
                        focus={keys.cell(row, index + 1)}
                      />
                    ) : (
                      <MarkCell role={role} fit={fit} on={on} />
                    )}
                  </td>
                );
              })}
              {published && (
                <td
                  role="gridcell"
                  className={cx(
                    cellClass,
                    "min-w-28 border-l px-3 py-2.5 max-md:border-l-0 max-md:py-1",
                  )}
                >
                  <AnswerCell singer={singer} published />
                </td>
              )}
            </tr>
          ))}
        </tbody>
      </table>
      {singers.length === 0 && (
        <p className="px-3 py-8 text-ink-2">Nobody matches. Show everyone, or try fewer letters.</p>
      )}
    </div>
  );
}
