import type { Metadata } from "next";
import Link from "next/link";
import { PageTitle, SectionTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { listSheetDays } from "@/lib/data/sheets/read";
import { localDay } from "@/lib/format-dates";
import { DayRow } from "../_components/day-row";

export const metadata: Metadata = { title: "Call sheets" };

/** Every day that has a call or an issue: what comes first, then what was. */
export default async function CallSheetsPage({
  params,
}: PageProps<"/productions/[productionId]/call-sheets">) {
  const { productionId } = await params;
  const actor = await pageActor(`/productions/${productionId}/call-sheets`);
  const { days, zone, locale, mayIssue } = await orNotFound(listSheetDays(actor, productionId));
  const today = localDay(new Date(), zone);
  const coming = days.filter((day) => day.localDate >= today);
  const past = days.filter((day) => day.localDate < today).reverse();
  const list = (shown: typeof days) => (
    <ul>
      {shown.map((day) => (
        <DayRow
          key={day.localDate}
          productionId={productionId}
          day={day}
          zone={zone}
          locale={locale}
          showReading={mayIssue}
        />
      ))}
    </ul>
  );
  return (
    <>
      <PageTitle
        title="Call sheets"
        sub="A day’s published calls, issued to everyone they concern."
      />
      {days.length === 0 ? (
        <EmptyState
          title="No day has a call yet"
          {...(mayIssue && {
            action: (
              <Button asChild kind="primary">
                <Link href={`/productions/${productionId}/rehearsals/new`}>Make a call</Link>
              </Button>
            ),
          })}
        >
          Once a call is published, its day has a call sheet here: who is needed when, for what and
          where, with release times and what comes next.
        </EmptyState>
      ) : (
        <div className="flex flex-col gap-10">
          {coming.length > 0 && (
            <section aria-labelledby="coming">
              <SectionTitle id="coming" ruled>
                To come
              </SectionTitle>
              {list(coming)}
            </section>
          )}
          {past.length > 0 && (
            <section aria-labelledby="past">
              <SectionTitle id="past" ruled>
                Past
              </SectionTitle>
              {list(past)}
            </section>
          )}
        </div>
      )}
    </>
  );
}
