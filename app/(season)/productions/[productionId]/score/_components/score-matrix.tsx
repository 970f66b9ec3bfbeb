import Link from "next/link";
import { RehearsalMark } from "@/components/layout/rehearsal-mark";
import { LineOnScale } from "@/components/music/line-on-scale";
import { cx } from "@/components/ui/cx";
import { Table } from "@/components/ui/table";
import { groupBy } from "@/lib/group-by";
import { pitchName } from "@/lib/music/pitch-name";
import type { PitchSpan } from "@/lib/music/types";
import { keyInShort } from "@/lib/score/keys";
import { formatLength } from "@/lib/score/number-length";
import { drawnLine, scaleOf } from "@/lib/score/score-view";
import type { ScoreLine, ScoreNumber, ScoreRole, ScoreView } from "@/lib/score/score-view";
import { scoreHref } from "./selection";

type Props = {
  productionId: string;
  view: ScoreView;
  role: ScoreRole | null;
  number: ScoreNumber | null;
};

/** Numbers down, roles across, each line on one pitch scale. On a phone the list by number stands in its place. */
export function ScoreMatrix({ productionId, view, role, number }: Props) {
  const cells = groupBy(view.lines, (line) => `${line.roleId} ${line.numberId}`);
  const scale = scaleOf(view.lines);
  return (
    <div className="hidden md:block print:block">
      <Table caption="What each role sings, number by number">
        <thead>
          <tr>
            <th
              scope="col"
              className="sticky left-0 z-10 border-r border-b border-rule bg-sheet px-3 py-3"
            >
              <span className="sr-only">Number</span>
            </th>
            <th
              scope="col"
              className="border-b border-rule px-2 py-3 text-left small-caps font-normal"
            >
              Key
            </th>
            <th
              scope="col"
              className="border-r border-b border-rule px-2 py-3 text-left small-caps font-normal"
            >
              Length
            </th>
            {view.roles.map((each) => (
              <RoleHead
                key={each.id}
                productionId={productionId}
                role={each}
                selected={each.id === role?.id}
              />
            ))}
          </tr>
        </thead>
        <tbody>
          {view.numbers.map((row) => (
            <tr key={row.id} className="group">
              <th
                scope="row"
                className="sticky left-0 z-10 max-w-64 min-w-44 border-r border-b border-rule bg-sheet px-3 py-1.5 text-left"
              >
                <NumberLink
                  productionId={productionId}
                  number={row}
                  selected={row.id === number?.id}
                />
              </th>
              <td className="border-b border-rule px-2 py-1.5 text-sm">{keyInShort(row)}</td>
              <td className="border-r border-b border-rule px-2 py-1.5 text-sm text-ink-2">
                {row.seconds === null ? "" : formatLength(row.seconds)}
              </td>
              {view.roles.map((each) => (
                <td
                  key={each.id}
                  className={cx(
                    "border-r border-b border-rule p-0",
                    each.id === role?.id && row.id === number?.id && "bg-smalt-wash",
                  )}
                >
                  <LineCell
                    productionId={productionId}
                    lines={cells.get(`${each.id} ${row.id}`) ?? []}
                    role={each}
                    number={row}
                    scale={scale}
                    mayChange={view.mayChange}
                  />
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </Table>
      {view.lines.length > 0 && (
        <p className="mt-2 text-sm text-ink-2">
          From {pitchName(scale.low)} at the left of every column to {pitchName(scale.high)} at its
          right; the thick part is where the middle half of the sung time lies.
        </p>
      )}
    </div>
  );
}

function RoleHead({
  productionId,
  role,
  selected,
}: {
  productionId: string;
  role: ScoreRole;
  selected: boolean;
}) {
  return (
    <th
      scope="col"
      className={cx(
        "border-r border-b border-rule p-0 text-left align-bottom",
        selected && "bg-smalt-wash",
      )}
    >
      <Link
        href={scoreHref(productionId, { role: role.id })}
        scroll={false}
        aria-current={selected ? "true" : undefined}
        className="block max-w-40 px-2 py-3 font-serif text-lg leading-tight font-medium text-ink hover:underline"
      >
        {role.name}
      </Link>
    </th>
  );
}

function NumberLink({
  productionId,
  number,
  selected,
}: {
  productionId: string;
  number: ScoreNumber;
  selected: boolean;
}) {
  return (
    <Link
      href={scoreHref(productionId, { number: number.id })}
      scroll={false}
      aria-current={selected ? "true" : undefined}
      className={cx(
        "flex min-h-9 items-center gap-3 text-ink hover:underline",
        selected && "bg-smalt-wash",
      )}
    >
      <RehearsalMark>{number.label}</RehearsalMark>
      <span className="min-w-0 font-serif text-lg leading-tight font-medium">{number.title}</span>
    </Link>
  );
}

function LineCell({
  productionId,
  lines,
  role,
  number,
  scale,
  mayChange,
}: {
  productionId: string;
  lines: readonly ScoreLine[];
  role: ScoreRole;
  number: ScoreNumber;
  scale: PitchSpan;
  mayChange: boolean;
}) {
  const href = scoreHref(productionId, { role: role.id, number: number.id });
  const drawn = drawnLine(lines);
  if (drawn) {
    return (
      <Link
        href={href}
        scroll={false}
        prefetch={false}
        className="flex min-h-12 items-center px-2 hover:bg-bone"
      >
        <span className="sr-only">
          {role.name} in {number.title}:
        </span>
        <LineOnScale
          {...drawn}
          scale={scale}
          fifths={number.keyFifths ?? 0}
          className="w-20! min-w-0!"
        />
      </Link>
    );
  }
  if (!mayChange) return <span className="block min-h-12" />;
  // For the mouse alone: by keyboard the same is one choice in the role's column, not a hundred stops on the way.
  return (
    <Link
      href={href}
      scroll={false}
      prefetch={false}
      tabIndex={-1}
      aria-label={`Type what ${role.name} sings in ${number.title}`}
      className="flex min-h-12 items-center justify-center text-lg text-transparent hover:bg-bone hover:text-ink-2 focus-visible:text-ink-2 print:hidden"
    >
      +
    </Link>
  );
}
