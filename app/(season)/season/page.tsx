import type { Metadata } from "next";
import Link from "next/link";
import { PageTitle } from "@/components/layout/page-title";
import { SeasonStaves } from "@/components/schedule/season-staves";
import { Button } from "@/components/ui/button";
import { Chip } from "@/components/ui/chip";
import { pageActor } from "@/lib/auth/get-actor";
import { listCompanies, listCompaniesToCreateIn } from "@/lib/data/productions";
import { readSeason } from "@/lib/data/season";
import { dayAndClock, localDay } from "@/lib/format-dates";
import { CastSoFar } from "./_components/cast-so-far";
import { asText, clashInWords } from "./_components/clash-words";
import { count, findNeeds } from "./_components/needs";
import { NeedsYou } from "./_components/needs-you";
import { PrintButton } from "./_components/print-button";
import { SeasonStart } from "./_components/season-start";
import { seasonWindow } from "./_components/season-window";
import { toStaves } from "./_components/to-staves";
import { TodayList } from "./_components/today-list";

export const metadata: Metadata = { title: "Season" };

export default async function SeasonPage({ searchParams }: PageProps<"/season">) {
  const { from } = await searchParams;
  const actor = await pageActor("/season");
  const [companies, creatable] = await Promise.all([
    listCompanies(actor),
    listCompaniesToCreateIn(actor),
  ]);
  const now = new Date();
  const zone = companies[0]?.zone ?? "UTC";
  const today = localDay(now, zone);
  const current = seasonWindow(undefined, today, zone);
  const shown = seasonWindow(typeof from === "string" ? from : undefined, today, zone);
  // Today and what needs one do not change with the weeks that are looked at.
  const season = await readSeason(actor, current);
  if (season.productions.length === 0) {
    return (
      <SeasonStart
        email={actor.email}
        hasOwnPage={actor.positions.length > 0}
        canCreate={creatable.length > 0}
      />
    );
  }
  const seen = shown.start === current.start ? season : await readSeason(actor, shown);
  const ahead = { ...seen, clashes: seen.clashes.filter((clash) => clash.to > now) };
  const staves = toStaves(ahead, now);
  const groups = new Set(season.productions.map((p) => p.companyId)).size;
  return (
    <div className="print:[page:wide]">
      <PageTitle
        title="Your season"
        sub={`${count(season.productions.length, "production")}, ${groups === 1 ? "one company" : `${String(groups)} companies`}. Each stave is a production, each bar a week; the five lines run from morning (top) to late evening.`}
        chips={
          ahead.clashes.length > 0 ? (
            <Chip tone="clash">
              {ahead.clashes.length === 1 ? "1 clash" : `${String(ahead.clashes.length)} clashes`}
            </Chip>
          ) : (
            <Chip tone="fits">No clashes</Chip>
          )
        }
        actions={
          <>
            <PrintButton>Print the season</PrintButton>
            {creatable.length > 0 && (
              <Button asChild kind="primary">
                <Link href="/productions/new">New production</Link>
              </Button>
            )}
          </>
        }
      />
      <div className="flex flex-col gap-10">
        <div className="min-w-0 max-md:order-2">
          <nav aria-label="Weeks" className="mb-2 flex flex-wrap gap-x-6 gap-y-1 print:hidden">
            <Link href={`/season?from=${shown.earlier}`} className="row-link">
              Earlier weeks
            </Link>
            {shown.start !== current.start && (
              <Link href="/season" className="row-link">
                These weeks
              </Link>
            )}
            <Link href={`/season?from=${shown.later}`} className="row-link">
              Later weeks
            </Link>
          </nav>
          <SeasonStaves
            weeks={shown.weeks}
            groups={staves.groups}
            clashes={staves.clashes}
            today={today}
            label="Your season"
          />
          {/* On paper a circle has to say by itself what clashes. */}
          <ul className="mt-4 hidden text-sm print:block">
            {ahead.clashes.map((clash) => (
              <li key={clash.id}>
                {dayAndClock(clash.from, clash.zone)}: {asText(clashInWords(clash, ahead))}
              </li>
            ))}
          </ul>
        </div>
        <div className="grid gap-x-10 gap-y-10 md:grid-cols-2 xl:grid-cols-[1.25fr_1fr_1fr] print:hidden">
          <NeedsYou needs={findNeeds(season, now)} />
          <TodayList season={season} now={now} />
          <CastSoFar season={season} />
        </div>
      </div>
    </div>
  );
}
