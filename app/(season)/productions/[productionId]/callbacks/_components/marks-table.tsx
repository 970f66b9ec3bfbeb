import { useGridKeys } from "@/components/casting/use-grid-keys";
import { Button } from "@/components/ui/button";
import { cx } from "@/components/ui/cx";
import type { Draft, DraftRole, DraftSinger } from "@/lib/client/callbacks";
import { isFar } from "@/lib/client/casting";
import { pitchName } from "@/lib/music/pitch-name";
import { AnswerCell } from "./answer-cell";
import { SingerHead } from "./singer-head";
import { MarkCell, TickCell } from "./tick-cell";
import type { Mark } from "./use-marks";

const headClass =
  "sticky top-0 z-10 border-b border-rule bg-sheet px-2 pt-3 pb-2 align-bottom font-normal";
// On phones a row is a card: the singer, then the roles side by side.
const cellClass = "border-b border-rule align-top group-last:border-b-0 max-md:border-b-0";

// Up to eight roles fit beside the singers on a wide page, and the page itself scrolls.
const ALL_IN_VIEW = 8;

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
  const marking = draft.may.mark;
  const cellRole = marking ? "gridcell" : "cell";
  const keys = useGridKeys({ rows: singers.length, columns: roles.length + 1 });
  return (
    <div className="@container">
      <div
        // Without boxes to go to, the keyboard scrolls the sheet itself.
        {...(!marking && {
          role: "region",
          "aria-label": "Who is called back for what",
          tabIndex: 0,
        })}
        className={cx(
          "max-h-[max(26rem,calc(100dvh-2rem))] overflow-auto border-y-2 border-ink bg-sheet max-md:max-h-none print:max-h-none print:overflow-visible",
          roles.length <= ALL_IN_VIEW && "@min-[62rem]:max-h-none @min-[62rem]:overflow-visible",
        )}
      >
        <table
          role={marking ? "grid" : "table"}
          onKeyDown={keys.onKeyDown}
          className="w-full border-separate border-spacing-0 text-left max-md:block"
        >
          <caption className="sr-only">
            Who is called back for what.
            {marking && " Arrow keys move between the boxes, space ticks one."}
          </caption>
          <thead role="rowgroup" className="max-md:sr-only">
            <tr role="row">
              <th
                role="columnheader"
                scope="col"
                className={cx(headClass, "left-0 z-20 w-44 min-w-44 pl-3")}
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
                  <span className="block font-serif text-lg leading-tight wrap-break-word text-ink">
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
                className="group max-md:grid max-md:grid-cols-2 max-md:border-b max-md:border-rule max-md:py-2 max-md:last:border-b-0"
              >
                <th
                  role="rowheader"
                  scope="row"
                  className={cx(
                    cellClass,
                    "sticky left-0 z-[5] bg-sheet px-3 py-2.5 font-normal max-md:static max-md:col-span-2",
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
                  const fit = singer.fits[draft.roles.indexOf(role)] ?? {
                    verdict: null,
                    words: "",
                  };
                  const on = singer.marks.includes(role.id);
                  const far = singer.range && role.line ? isFar(singer.range, role.line) : false;
                  return (
                    <td
                      key={role.id}
                      role={cellRole}
                      className={cx(
                        cellClass,
                        "min-w-22 scroll-mt-36 scroll-ml-48 border-l max-md:border-l-0 md:h-px",
                      )}
                    >
                      {marking && !(singer.withdrawn && !on) ? (
                        <TickCell
                          singer={singer}
                          role={role}
                          fit={fit}
                          far={far}
                          on={on}
                          onChange={(now) =>
                            onMark({ personId: singer.personId, roleId: role.id, on: now })
                          }
                          focus={keys.cell(row, index + 1)}
                        />
                      ) : (
                        <MarkCell role={role} fit={fit} far={far} on={on} />
                      )}
                    </td>
                  );
                })}
                {published && (
                  <td
                    role={cellRole}
                    className={cx(
                      cellClass,
                      "min-w-32 border-l px-2 py-2.5 max-md:col-span-2 max-md:border-l-0 max-md:px-3",
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
          <p className="px-3 py-8 text-ink-2">
            Nobody matches. Show everyone, or try fewer letters.
          </p>
        )}
      </div>
    </div>
  );
}
