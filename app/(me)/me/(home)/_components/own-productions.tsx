import type { Route } from "next";
import Link from "next/link";
import { SectionTitle } from "@/components/layout/page-title";
import type { ProductionListed } from "@/lib/data/productions";
import { POSITION_NAMES } from "@/lib/permissions/position-kinds";

/** Where the person works: every production by name with its company; those with plans to read are links. */
export function OwnProductions({ productions }: { productions: readonly ProductionListed[] }) {
  if (productions.length === 0) return null;
  return (
    <section aria-labelledby="productions">
      <SectionTitle id="productions" ruled>
        Your productions
      </SectionTitle>
      <ul>
        {productions.map((production) => {
          const open =
            production.positions.length === 0 ||
            production.positions.some((kind) => kind !== "actor" && kind !== "accompanist");
          const title = <cite className="text-lg">{production.title}</cite>;
          return (
            <li key={production.id} className="border-b border-rule py-3">
              {open ? (
                <Link
                  href={`/productions/${production.id}` as Route}
                  className="row-link inline-flex min-h-11 items-center md:min-h-0"
                >
                  {title}
                </Link>
              ) : (
                title
              )}
              <p className="text-sm text-ink-2">
                {production.companyName}
                {production.positions.length > 0 &&
                  ` · ${production.positions.map((kind) => POSITION_NAMES[kind]).join(", ")}`}
              </p>
            </li>
          );
        })}
      </ul>
    </section>
  );
}
