import Link from "next/link";
import { RehearsalMark } from "@/components/layout/rehearsal-mark";
import { LineOnScale } from "@/components/music/line-on-scale";
import { groupBy } from "@/lib/group-by";
import { pitchName } from "@/lib/music/pitch-name";
import { keyInShort } from "@/lib/score/keys";
import { formatLength } from "@/lib/score/number-length";
import { drawnLine, scaleOf } from "@/lib/score/score-view";
import type { ScoreView } from "@/lib/score/score-view";
import { scoreHref } from "./selection";

/** The score on a phone: number by number, who sings and how high. */
export function ScoreList({ productionId, view }: { productionId: string; view: ScoreView }) {
  const scale = scaleOf(view.lines);
  const byNumber = groupBy(view.lines, (line) => line.numberId);
  return (
    <div className="md:hidden print:hidden">
      <nav aria-label="Roles" className="mb-6 flex flex-wrap gap-2">
        {view.roles.map((role) => (
          <Link
            key={role.id}
            href={scoreHref(productionId, { role: role.id }, "#side")}
            className="inline-flex min-h-11 items-center rounded-md border border-ink bg-sheet px-3 font-serif text-lg text-ink"
          >
            {role.name}
          </Link>
        ))}
      </nav>
      <ol className="border-t-2 border-ink">
        {view.numbers.map((number) => {
          const byRole = groupBy(byNumber.get(number.id) ?? [], (line) => line.roleId);
          return (
            <li key={number.id} className="border-b border-rule py-3">
              <Link
                href={scoreHref(productionId, { number: number.id }, "#side")}
                className="flex min-h-11 items-center gap-3 text-ink"
              >
                <RehearsalMark>{number.label}</RehearsalMark>
                <span className="min-w-0 flex-1 font-serif text-lg leading-tight">
                  {number.title}
                </span>
                <span className="text-sm whitespace-nowrap text-ink-2">
                  {[keyInShort(number), number.seconds === null ? "" : formatLength(number.seconds)]
                    .filter(Boolean)
                    .join(" · ")}
                </span>
              </Link>
              <ul>
                {view.roles.map((role) => {
                  const drawn = drawnLine(byRole.get(role.id) ?? []);
                  return (
                    drawn && (
                      <li key={role.id}>
                        <Link
                          href={scoreHref(
                            productionId,
                            { role: role.id, number: number.id },
                            "#side",
                          )}
                          prefetch={false}
                          className="grid min-h-11 grid-cols-[minmax(0,1fr)_6rem_auto] items-center gap-3 text-sm text-ink"
                        >
                          <span className="truncate">{role.name}</span>
                          <LineOnScale {...drawn} scale={scale} fifths={number.keyFifths ?? 0} />
                          <span aria-hidden="true" className="min-w-18 text-right text-ink-2">
                            {pitchName(drawn.low, { prefer: number.keyFifths ?? 0 })}–
                            {pitchName(drawn.high, { prefer: number.keyFifths ?? 0 })}
                          </span>
                        </Link>
                      </li>
                    )
                  );
                })}
              </ul>
            </li>
          );
        })}
      </ol>
    </div>
  );
}
