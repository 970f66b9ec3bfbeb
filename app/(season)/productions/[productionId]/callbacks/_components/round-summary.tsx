import type { DraftRound } from "@/lib/client/callbacks";
import { clockSpan, localDay, longDay } from "@/lib/format-dates";

/** "Tuesday 23 March, 18:00–21:00", or that it is not set. */
export function whenInWords(round: DraftRound): string {
  if (round.startsAt === null || round.endsAt === null) return "time to follow";
  const [from, to] = [new Date(round.startsAt), new Date(round.endsAt)];
  return `${longDay(localDay(from, round.zone))}, ${clockSpan(from, to, round.zone)}`;
}

/** When, where and what to prepare, for those who only read. */
export function RoundSummary({ round }: { round: DraftRound }) {
  const rows = [
    ["When", whenInWords(round)],
    ["Where", round.room ?? "place to follow"],
    ["Prepare", round.material ?? "nothing named"],
  ];
  return (
    <dl className="text-sm">
      {rows.map(([name, value]) => (
        <div key={name} className="grid grid-cols-[4.5rem_1fr] gap-2 border-b border-rule py-2">
          <dt className="text-ink-2">{name}</dt>
          <dd className="whitespace-pre-line">{value}</dd>
        </div>
      ))}
    </dl>
  );
}
