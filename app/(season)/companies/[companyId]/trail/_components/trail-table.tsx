import { TimeText } from "@/components/ui/time-text";
import type { Trail } from "@/lib/data/trail";
import { dayOfYear, localDay } from "@/lib/format-dates";
import { groupBy } from "@/lib/group-by";

/** The changes by day, each in one line: when, who, what. */
export function TrailTable({ trail }: { trail: Trail }) {
  const { zone, locale } = trail.company;
  const days = groupBy(trail.events, (event) => localDay(event.at, zone));
  return (
    <div className="flex flex-col gap-7">
      {[...days.entries()].map(([day, events]) => (
        <section key={day} aria-labelledby={`day-${day}`}>
          <h2 id={`day-${day}`} className="border-b border-rule pb-1 text-xl">
            {dayOfYear(day, locale)}
          </h2>
          <ol>
            {events.map((event) => (
              <li
                key={event.id}
                className="grid grid-cols-[3.5rem_minmax(0,1fr)] gap-x-4 border-b border-rule py-2 text-sm md:grid-cols-[3.5rem_minmax(0,14rem)_minmax(0,1fr)]"
              >
                <TimeText at={event.at} timeZone={zone} />
                <span className="font-bold">{event.who}</span>
                <span className="max-md:col-start-2">
                  {event.what}
                  {event.production !== null && trail.production === null && (
                    <span className="text-ink-2">
                      {", "}
                      <cite>{event.production}</cite>
                    </span>
                  )}
                </span>
              </li>
            ))}
          </ol>
        </section>
      ))}
    </div>
  );
}
