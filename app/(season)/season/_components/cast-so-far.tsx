import Link from "next/link";
import { SectionTitle } from "@/components/layout/page-title";
import type { Season } from "@/lib/data/season";
import { count } from "./needs";

/** Per production whose casting this person may see: how many roles have everyone they need. */
export function CastSoFar({ season }: { season: Season }) {
  const titles = new Map(season.productions.map((p) => [p.id, p.title]));
  const rows = season.progress.flatMap(({ productionId, roles }) =>
    roles === null ? [] : [{ productionId, roles, title: titles.get(productionId) ?? "" }],
  );
  if (rows.length === 0) return null;
  return (
    <section aria-labelledby="cast-so-far">
      <SectionTitle id="cast-so-far" ruled>
        Cast so far
      </SectionTitle>
      <ul className="flex flex-col gap-4 pt-3">
        {rows.map(({ productionId, roles, title }) => (
          <li key={productionId}>
            <div className="flex items-baseline justify-between gap-4 text-sm">
              <Link
                href={`/productions/${productionId}/casting`}
                className="min-w-0 py-0.5 text-ink no-underline hover:underline"
              >
                <cite>{title}</cite>
              </Link>
              <span className="shrink-0 text-ink-2">
                {roles.all === 0
                  ? "no roles yet"
                  : `${String(roles.cast)} of ${count(roles.all, "role")}`}
              </span>
            </div>
            <div aria-hidden="true" className="mt-1 h-1.5 border border-ink bg-sheet">
              <div
                className="h-full bg-ink print:bg-black"
                style={{
                  width: `${String(roles.all === 0 ? 0 : (100 * roles.cast) / roles.all)}%`,
                }}
              />
            </div>
          </li>
        ))}
      </ul>
    </section>
  );
}
