import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { PageTitle, SectionTitle } from "@/components/layout/page-title";
import { SideColumn } from "@/components/layout/side-column";
import { Button } from "@/components/ui/button";
import { Chip } from "@/components/ui/chip";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { productionFor } from "@/lib/data/guard";
import { readSheetDay } from "@/lib/data/sheets/issues";
import { dayAndClock, longDay } from "@/lib/format-dates";
import { localDateField } from "@/lib/schemas/common";
import { IssueForm } from "../_components/issue-form";
import { SheetPaper } from "../_components/sheet-paper";

export const metadata: Metadata = { title: "Call sheet of a day" };

/** The sheet of one day as it would go out now, what changed since the last issue, and the button that issues it. */
export default async function SheetDayPage({
  params,
}: PageProps<"/productions/[productionId]/call-sheets/[localDate]">) {
  const { productionId, localDate } = await params;
  if (!localDateField.safeParse(localDate).success) notFound();
  const actor = await pageActor(`/productions/${productionId}/call-sheets/${localDate}`);
  const [scope, day] = await orNotFound(
    Promise.all([
      productionFor(actor, productionId, "sheets:read"),
      readSheetDay(actor, { productionId, localDate }),
    ]),
  );
  const { last } = day;
  const nothing = day.sheet.blocks.length === 0 && last === null;
  return (
    <>
      <PageTitle
        title={longDay(localDate, day.locale)}
        sub={
          last
            ? `Issue ${String(last.number)} was sent ${dayAndClock(last.issuedAt, day.sheet.zone, day.locale)}.`
            : "Not issued yet."
        }
        {...(last && {
          actions: (
            <Button asChild>
              <Link href={`/productions/${productionId}/call-sheets/issues/${last.id}`}>
                See issue {last.number}
              </Link>
            </Button>
          ),
        })}
      />
      <SideColumn
        sideLabel="Issue"
        side={
          <>
            {last && (
              <section aria-labelledby="changed">
                <SectionTitle id="changed">Changed since issue {last.number}</SectionTitle>
                {day.sheet.changed.length > 0 ? (
                  <ul className="list-disc pl-5 text-sm">
                    {day.sheet.changed.map((line) => (
                      <li key={line}>{line}</li>
                    ))}
                  </ul>
                ) : (
                  <p className="text-sm">
                    {day.fresh ? (
                      "Nobody has to do anything differently; what stands beside the blocks is new."
                    ) : (
                      <>
                        <Chip tone="fits">Nothing</Chip> Everyone has this already.
                      </>
                    )}
                  </p>
                )}
              </section>
            )}
            {day.mayIssue && !nothing && (
              <section aria-labelledby="issue">
                <SectionTitle id="issue">Issue</SectionTitle>
                <IssueForm
                  productionId={productionId}
                  localDate={localDate}
                  seen={day.seen}
                  number={day.sheet.issueNumber}
                  concerns={day.concerns}
                />
              </section>
            )}
            {nothing && (
              <p className="text-sm text-ink-2">
                No call of this day is published. Publish one, and its sheet stands here.
              </p>
            )}
          </>
        }
      >
        <SheetPaper sheet={day.sheet} paper={scope.paper} locale={day.locale} preview />
      </SideColumn>
    </>
  );
}
