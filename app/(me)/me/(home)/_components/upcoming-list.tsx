import type { Route } from "next";
import Link from "next/link";
import { SectionTitle } from "@/components/layout/page-title";
import { Chip } from "@/components/ui/chip";
import { clock, localDay, shortDay } from "@/lib/format-dates";
import type { Upcoming } from "./upcoming";

/** Where to be next, in order. */
export function UpcomingList({ items }: { items: readonly Upcoming[] }) {
  if (items.length === 0) return null;
  return (
    <section aria-labelledby="coming-up">
      <SectionTitle id="coming-up" ruled>
        Coming up
      </SectionTitle>
      <ol>
        {items.map((item) => (
          <li key={item.id} className="flex gap-4 border-b border-rule py-3">
            <p className="w-24 shrink-0">
              <strong className="block">{shortDay(localDay(item.startsAt, item.zone))}</strong>
              {clock(item.startsAt, item.zone)}–{clock(item.endsAt, item.zone)}
            </p>
            <div className="min-w-0 flex-1">
              <p>
                {item.what} · <cite>{item.production}</cite>
              </p>
              {item.where !== null && <p className="text-sm text-ink-2">{item.where}</p>}
              {(item.state ?? item.changeHref) && (
                <p className="mt-1 flex flex-wrap items-center gap-x-3">
                  {item.state && <Chip tone={item.state.tone}>{item.state.words}</Chip>}
                  {item.changeHref !== null && (
                    <Link
                      href={item.changeHref as Route}
                      className="inline-flex min-h-11 items-center text-link md:min-h-8"
                    >
                      Change
                      <span className="sr-only">
                        {" "}
                        the answer: {item.what}, {item.production}
                      </span>
                    </Link>
                  )}
                </p>
              )}
            </div>
          </li>
        ))}
      </ol>
    </section>
  );
}
