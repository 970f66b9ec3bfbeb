import type { Metadata } from "next";
import Link from "next/link";
import { PageTitle, SectionTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { Chip } from "@/components/ui/chip";
import { EmptyState } from "@/components/ui/empty-state";
import { formatDuration } from "@/components/ui/format-duration";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { productionFor } from "@/lib/data/guard";
import { listSessions } from "@/lib/data/pianists/sessions";
import { clock, localDay, longDay } from "@/lib/format-dates";
import { SessionRow } from "../_components/session-row";

export const metadata: Metadata = { title: "Pianists" };

/** From today on: who plays when, what has no pianist yet, and how much each plays that day. */
export default async function PianistsPage({
  params,
}: PageProps<"/productions/[productionId]/pianists">) {
  const { productionId } = await params;
  const actor = await pageActor(`/productions/${productionId}/pianists`);
  const scope = await orNotFound(productionFor(actor, productionId, "pianists:see"));
  const plan = await listSessions(actor, { productionId, since: localDay(new Date(), scope.zone) });
  const missing = plan.days
    .flatMap((day) => day.sessions)
    .filter((session) => session.gaps.length > 0).length;
  const noAccompanist = plan.accompanists.length === 0;
  return (
    <>
      <PageTitle
        title="Pianists"
        sub={
          noAccompanist
            ? "Nobody is an accompanist of this production yet."
            : `${plan.accompanists.map(({ name }) => name).join(", ")} ${plan.accompanists.length === 1 ? "plays" : "play"} for this production.`
        }
        chips={
          missing > 0 ? (
            <Chip tone="clash">
              {missing === 1
                ? "1 session has no pianist for all of it"
                : `${String(missing)} sessions have no pianist for all of them`}
            </Chip>
          ) : null
        }
        actions={
          noAccompanist && plan.mayAssign ? (
            <Button asChild kind="primary">
              <Link href={`/productions/${productionId}/people`}>Invite an accompanist</Link>
            </Button>
          ) : null
        }
      />
      {plan.days.length === 0 ? (
        <EmptyState
          title="Nothing to play for yet"
          action={
            <Button asChild>
              <Link href={`/productions/${productionId}/rehearsals`}>To the rehearsals</Link>
            </Button>
          }
        >
          Audition rooms and calls from today on stand here by day, with who plays and what has no
          pianist yet.
        </EmptyState>
      ) : (
        <div className="flex flex-col gap-10">
          {plan.days.map((day) => (
            <section key={day.localDate} aria-labelledby={`day-${day.localDate}`}>
              <SectionTitle id={`day-${day.localDate}`} ruled>
                {longDay(day.localDate, plan.locale)}
              </SectionTitle>
              <ul>
                {day.sessions.map((session) => (
                  <SessionRow
                    key={session.id}
                    productionId={productionId}
                    session={session}
                    plan={plan}
                  />
                ))}
              </ul>
              {day.loads.length > 0 && (
                <p className="mt-2 text-sm text-ink-2">
                  {day.loads
                    .map(
                      (load) =>
                        `${load.name}: ${formatDuration(load.minutes)} at the piano, ${clock(load.from, plan.zone)}–${clock(load.to, plan.zone)}`,
                    )
                    .join(" · ")}
                </p>
              )}
            </section>
          ))}
        </div>
      )}
    </>
  );
}
