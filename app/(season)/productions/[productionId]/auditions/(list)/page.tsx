import type { Metadata } from "next";
import Link from "next/link";
import { PageTitle, SectionTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { listDays } from "@/lib/data/auditions/days";
import { listSignUps } from "@/lib/data/auditions/sign-ups";
import { productionFor } from "@/lib/data/guard";
import { can } from "@/lib/permissions/can";
import { AddSinger } from "../_components/add-singer";
import { DayList } from "../_components/day-list";
import { SignUpsTable } from "../_components/sign-ups-table";

export const metadata: Metadata = { title: "Auditions" };

/** The audition days of a production and everyone signed up for them. */
export default async function AuditionsPage({
  params,
}: PageProps<"/productions/[productionId]/auditions">) {
  const { productionId } = await params;
  const actor = await pageActor(`/productions/${productionId}/auditions`);
  const scope = await orNotFound(productionFor(actor, productionId, "auditions:read"));
  const [days, signUps] = await Promise.all([
    listDays(actor, productionId),
    listSignUps(actor, productionId),
  ]);
  const mayPlan = can(actor, "auditions:plan", { companyId: scope.companyId, productionId });
  const placed = signUps.filter((row) => row.slot !== null).length;

  const importLink = (
    <Button asChild>
      <Link href={`/productions/${productionId}/auditions/import`}>Import singers</Link>
    </Button>
  );
  const newDay = (
    <Button asChild kind="primary">
      <Link href={`/productions/${productionId}/auditions/new`}>Make an audition day</Link>
    </Button>
  );
  return (
    <>
      <PageTitle
        title="Auditions"
        sub={
          signUps.length > 0
            ? `${String(signUps.length)} signed up, ${String(placed)} with a time.`
            : "Days, rooms and times, and everyone who wants to be heard."
        }
        {...(mayPlan && {
          actions: [<span key="import">{importLink}</span>, <span key="day">{newDay}</span>],
        })}
      />
      <div className="flex flex-col gap-10">
        <section aria-labelledby="days">
          <SectionTitle id="days" ruled>
            Days
          </SectionTitle>
          {days.length > 0 ? (
            <DayList productionId={productionId} days={days} locale={scope.locale} />
          ) : (
            <EmptyState title="No audition day yet" level={3} {...(mayPlan && { action: newDay })}>
              A day has a date, one or more rooms with opening times, and slots of a few minutes
              with the pianist’s rests and lunch in place.
            </EmptyState>
          )}
        </section>
        <section aria-labelledby="singers">
          <div className="mb-3 flex flex-wrap items-end justify-between gap-3">
            <SectionTitle id="singers">Singers</SectionTitle>
            {mayPlan && <AddSinger productionId={productionId} />}
          </div>
          {signUps.length > 0 ? (
            <SignUpsTable
              productionId={productionId}
              rows={signUps}
              mayChange={mayPlan}
              locale={scope.locale}
            />
          ) : (
            <EmptyState
              title="Nobody is signed up yet"
              level={3}
              {...(mayPlan && { action: importLink })}
            >
              Bring a list as a spreadsheet, or add singers one by one. Each becomes a person of the
              company and waits for a time.
            </EmptyState>
          )}
        </section>
      </div>
    </>
  );
}
