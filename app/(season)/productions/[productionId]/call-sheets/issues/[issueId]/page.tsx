import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { LiveData } from "@/components/layout/live-data";
import { PageTitle, SectionTitle } from "@/components/layout/page-title";
import { SideColumn } from "@/components/layout/side-column";
import { Notice } from "@/components/ui/notice";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { listOwnSheets } from "@/lib/data/sheets/own";
import { listAcknowledgements, readIssue } from "@/lib/data/sheets/read";
import { dayAndClock, longDay } from "@/lib/format-dates";
import { issueAddressSchema, sheetFileSchema } from "@/lib/schemas/sheets";
import { SheetPaper } from "../../_components/sheet-paper";
import { AcknowledgeButton, PrintButton } from "./_components/issue-tools";
import { WhoHasRead } from "./_components/who-has-read";

export const metadata: Metadata = { title: "Call sheet" };

/** One issue as it went out: to read, print and take away, and who has read it. */
export default async function IssuePage({
  params,
  searchParams,
}: PageProps<"/productions/[productionId]/call-sheets/issues/[issueId]">) {
  const address = issueAddressSchema.safeParse(await params);
  if (!address.success) notFound();
  const { productionId, issueId } = address.data;
  const base = `/productions/${productionId}/call-sheets` as const;
  const actor = await pageActor(`${base}/issues/${issueId}`);
  const issue = await orNotFound(readIssue(actor, address.data));
  const asked = sheetFileSchema.safeParse({ paper: (await searchParams)["paper"] });
  const paper = (asked.success ? asked.data.paper : undefined) ?? issue.paper;
  const other = paper === "A4" ? "Letter" : "A4";
  const [own, readers] = await Promise.all([
    listOwnSheets(actor, { since: issue.sheet.localDate }),
    issue.maySeeWhoRead ? listAcknowledgements(actor, address.data) : null,
  ]);
  const mine = own.find((sheet) => sheet.issueId === issueId);
  const file = `/api/productions/${productionId}/call-sheets/${issueId}`;
  return (
    <>
      <div className="print:hidden">
        <PageTitle
          title={`Call sheet, ${longDay(issue.sheet.localDate, issue.locale)}`}
          sub={`Issue ${String(issue.sheet.issueNumber)}, sent ${dayAndClock(issue.issuedAt, issue.zone, issue.locale)}${issue.issuedBy === null ? "" : ` by ${issue.issuedBy}`}`}
          actions={
            <>
              {mine?.acknowledgedAt === null && <AcknowledgeButton issueId={issueId} />}
              <PrintButton />
            </>
          }
        />
        {issue.newest.id !== issueId && (
          <Notice tone="caution" className="mb-6" title="A newer issue has gone out.">
            <Link className="text-link" href={`${base}/issues/${issue.newest.id}`}>
              Read issue {issue.newest.number}
            </Link>
          </Notice>
        )}
      </div>
      <SideColumn
        sideLabel="Files and readers"
        side={
          <>
            <section aria-labelledby="files" className="print:hidden">
              <SectionTitle id="files">Take away</SectionTitle>
              <ul className="flex flex-col gap-1 text-sm">
                <li>
                  <a className="text-link" href={`${file}?format=xlsx&paper=${paper}`} download>
                    Spreadsheet (.xlsx), set up for {paper}
                  </a>
                </li>
                <li>
                  <a className="text-link" href={`${file}?format=csv`} download>
                    Comma-separated text (.csv)
                  </a>
                </li>
                <li>
                  Prints on {paper}.{" "}
                  <Link className="text-link" href={`${base}/issues/${issueId}?paper=${other}`}>
                    Use {other}
                  </Link>
                </li>
                <li>
                  <Link className="text-link" href={`${base}/${issue.sheet.localDate}`}>
                    The day as it stands now
                  </Link>
                </li>
              </ul>
            </section>
            {readers && (
              <LiveData>
                <WhoHasRead
                  productionId={productionId}
                  issueId={issueId}
                  zone={issue.zone}
                  initial={readers}
                />
              </LiveData>
            )}
          </>
        }
      >
        <SheetPaper sheet={issue.sheet} paper={paper} locale={issue.locale} />
      </SideColumn>
    </>
  );
}
