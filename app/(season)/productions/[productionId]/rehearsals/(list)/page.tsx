import { addDays, format, parseISO, startOfISOWeek } from "date-fns";
import type { Metadata } from "next";
import Link from "next/link";
import { PageTitle, SectionTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { listCallsOfWeek } from "@/lib/data/calls/list";
import { productionFor } from "@/lib/data/guard";
import { dayOfYear, localDay, longDay, shortDay } from "@/lib/format-dates";
import { groupBy } from "@/lib/group-by";
import { localDateField } from "@/lib/schemas/common";
import { CallRow } from "../_components/call-row";

export const metadata: Metadata = { title: "Rehearsals" };

const iso = (day: Date): string => format(day, "yyyy-MM-dd");

/** The calls of one week, by day. */
export default async function RehearsalsPage({
  params,
  searchParams,
}: PageProps<"/productions/[productionId]/rehearsals">) {
  const { productionId } = await params;
  const actor = await pageActor(`/productions/${productionId}/rehearsals`);
  const scope = await orNotFound(productionFor(actor, productionId, "calls:read"));
  const asked = localDateField.safeParse((await searchParams)["week"]);
  const today = localDay(new Date(), scope.zone);
  const monday = startOfISOWeek(parseISO(asked.success ? asked.data : today));
  const week = await listCallsOfWeek(actor, { productionId, monday: iso(monday) });
  const base = `/productions/${productionId}/rehearsals` as const;
  const newCall = (
    <Button asChild kind="primary">
      <Link href={`${base}/new`}>Make a call</Link>
    </Button>
  );
  const byDay = groupBy(week.calls, (call) => call.localDate);
  return (
    <>
      <PageTitle
        title="Rehearsals"
        sub={`Week of ${dayOfYear(iso(monday), week.locale)} to ${dayOfYear(iso(addDays(monday, 6)), week.locale)}`}
        {...(week.mayChange && { actions: newCall })}
      />
      {week.any ? (
        <>
          <nav aria-label="Weeks" className="mb-6 flex flex-wrap gap-x-6 gap-y-2">
            <Link className="row-link" href={`${base}?week=${iso(addDays(monday, -7))}`}>
              ← Week of {shortDay(iso(addDays(monday, -7)), week.locale)}
            </Link>
            <Link className="row-link" href={base}>
              This week
            </Link>
            <Link className="row-link" href={`${base}?week=${iso(addDays(monday, 7))}`}>
              Week of {shortDay(iso(addDays(monday, 7)), week.locale)} →
            </Link>
          </nav>
          {week.calls.length === 0 && (
            <EmptyState
              title="Nothing is called in this week"
              {...(week.mayChange && { action: newCall })}
            >
              {week.mayChange ? "Make a call, or look at another week." : "Look at another week."}
            </EmptyState>
          )}
          <div className="flex flex-col gap-8">
            {[...byDay].map(([day, calls]) => (
              <section key={day} aria-labelledby={`day-${day}`}>
                <SectionTitle id={`day-${day}`} ruled>
                  {longDay(day, week.locale)}
                  {day === today && <span className="text-base text-smalt"> today</span>}
                </SectionTitle>
                <ul>
                  {calls.map((call) => (
                    <CallRow key={call.id} productionId={productionId} call={call} />
                  ))}
                </ul>
              </section>
            ))}
          </div>
        </>
      ) : (
        <EmptyState title="No call yet" {...(week.mayChange && { action: newCall })}>
          A call is a time and a room with blocks in it: numbers from the score, scenes, a warm-up,
          a break. Who is needed follows from the casting, and clashes show while you make it.
        </EmptyState>
      )}
    </>
  );
}
