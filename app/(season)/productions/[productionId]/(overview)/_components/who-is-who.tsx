import Link from "next/link";
import { SectionTitle } from "@/components/layout/page-title";
import { POSITION_NAMES } from "@/lib/permissions/position-kinds";
import type { Road } from "@/lib/data/season/road";

/** How many hold each position, with the way to their names. */
export function WhoIsWho({
  productionId,
  people,
}: {
  productionId: string;
  people: NonNullable<Road["people"]>;
}) {
  return (
    <section aria-labelledby="people">
      <SectionTitle id="people" ruled>
        People
      </SectionTitle>
      <dl className="text-sm">
        {people.map(({ kind, count }) => (
          <div key={kind} className="flex justify-between gap-4 border-b border-rule py-2">
            <dt>{POSITION_NAMES[kind]}</dt>
            <dd className="font-bold">{count}</dd>
          </div>
        ))}
      </dl>
      <Link href={`/productions/${productionId}/people`} className="row-link mt-2">
        All people
      </Link>
    </section>
  );
}
