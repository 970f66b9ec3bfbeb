import type { Route } from "next";
import Link from "next/link";
import { SectionTitle } from "@/components/layout/page-title";
import type { Season } from "@/lib/data/season";
import { clock, clockSpan, localDay } from "@/lib/format-dates";
import { eventHref, eventName } from "./event-words";

type Line = {
  id: string;
  from: Date;
  zone: string;
  work: string;
  what: string;
  href: string;
};

function linesOf(season: Season, now: Date): Line[] {
  const titles = new Map(season.productions.map((p) => [p.id, p.title]));
  const isToday = ({ from, to, zone }: { from: Date; to: Date; zone: string }) => {
    const today = localDay(now, zone);
    return localDay(from, zone) <= today && localDay(to, zone) >= today;
  };
  const seen = season.events.filter(isToday).map((event) => ({
    id: event.id,
    from: event.from,
    zone: event.zone,
    work: titles.get(event.productionId) ?? "",
    what: [
      eventName(event.kind),
      `to ${clockSpan(event.from, event.to, event.zone).split("–")[1] ?? ""}`,
      ...(event.room === null ? [] : [event.room]),
      ...(event.draft ? ["not published yet"] : []),
    ].join(", "),
    href: eventHref(event),
  }));
  const own = season.elsewhere.filter(isToday).map((event) => ({
    id: event.id,
    from: event.from,
    zone: event.zone,
    work: event.production,
    what: `${eventName(event.kind)}, you sing or play`,
    href: "/me",
  }));
  return [...seen, ...own].sort((a, b) => a.from.getTime() - b.from.getTime());
}

/** What happens today, in order. */
export function TodayList({ season, now }: { season: Season; now: Date }) {
  const lines = linesOf(season, now);
  return (
    <section aria-labelledby="today">
      <SectionTitle id="today" ruled>
        Today
      </SectionTitle>
      {lines.length === 0 ? (
        <p className="py-3 text-ink-2">Nothing is called today.</p>
      ) : (
        <ol>
          {lines.map((line) => (
            <li
              key={line.id}
              className="grid grid-cols-[3.25rem_minmax(0,1fr)] gap-3 border-b border-rule py-3"
            >
              <span className="font-bold">{clock(line.from, line.zone)}</span>
              <div className="text-sm">
                <Link href={line.href as Route} className="text-ink no-underline hover:underline">
                  <cite>{line.work}</cite>
                </Link>
                <p className="text-ink-2">{line.what}</p>
              </div>
            </li>
          ))}
        </ol>
      )}
    </section>
  );
}
