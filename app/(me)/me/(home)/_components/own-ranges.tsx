import Link from "next/link";
import { PitchKeyboard } from "@/components/music/pitch-keyboard";
import { rangeInWords } from "@/components/music/range-in-words";
import { SectionTitle } from "@/components/layout/page-title";
import type { OwnRecord } from "@/lib/data/me";
import { dayOfYear, localDay } from "@/lib/format-dates";
import { singerRange } from "@/app/(me)/_components/singer-range";

/** The range that each company has on file; companies that have the same share a drawing. */
export function OwnRanges({ records }: { records: readonly OwnRecord[] }) {
  const singing = records.filter((record) => record.sings || record.ranges.best !== null);
  if (singing.length === 0) return null;
  const drawn = new Map<string, OwnRecord[]>();
  for (const record of singing) {
    const key =
      record.ranges.best === null
        ? ""
        : JSON.stringify({
            ...record.ranges.best,
            at: localDay(record.ranges.best.at, record.zone),
          });
    drawn.set(key, [...(drawn.get(key) ?? []), record]);
  }
  return (
    <section aria-labelledby="range" className="flex flex-col gap-4">
      <SectionTitle id="range">Your range on file</SectionTitle>
      {[...drawn.values()].map((same) => {
        const first = same[0];
        const best = first?.ranges.best;
        const companies = same.map((record) => record.company).join(", ");
        const named = drawn.size > 1 ? `${companies}: ` : "";
        if (!first || !best) {
          return (
            <p key={companies} className="text-ink-2">
              {named === "" ? "None yet." : `${named}none yet.`} With it they can see which roles
              may suit you.
            </p>
          );
        }
        const on = dayOfYear(localDay(best.at, first.zone), first.locale);
        return (
          <div key={companies}>
            <PitchKeyboard label={`${named}range on file`} range={singerRange(best)} />
            <p className="text-sm text-ink-2">
              {named}
              {rangeInWords(singerRange(best))}.{" "}
              {best.kind === "heard" ? `As heard from you on ${on}.` : `As given on ${on}.`}
            </p>
          </div>
        );
      })}
      <Link href="/me/range" className="row-link inline-flex min-h-11 items-center self-start">
        {singing.some((record) => record.ranges.best !== null) ? "Give it anew" : "Give your range"}
      </Link>
    </section>
  );
}
