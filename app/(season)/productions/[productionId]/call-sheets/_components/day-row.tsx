import Link from "next/link";
import { Chip } from "@/components/ui/chip";
import type { SheetDayListed } from "@/lib/data/sheets/read";
import { dayAndClock, longDay } from "@/lib/format-dates";

type Props = {
  productionId: string;
  day: SheetDayListed;
  zone: string;
  locale: string;
  showReading: boolean;
};

/** One day with a call: whether its sheet is out, and its issues. */
export function DayRow({ productionId, day, zone, locale, showReading }: Props) {
  const base = `/productions/${productionId}/call-sheets` as const;
  const calls = [
    day.published > 0 ? `${String(day.published)} ${day.published === 1 ? "call" : "calls"}` : "",
    day.drafts > 0 ? `${String(day.drafts)} ${day.drafts === 1 ? "draft" : "drafts"}` : "",
  ].filter(Boolean);
  return (
    <li className="grid gap-x-6 gap-y-1 border-b border-rule py-3 md:grid-cols-[15rem_minmax(0,1fr)_auto]">
      <p>
        <Link className="row-link" href={`${base}/${day.localDate}`}>
          {longDay(day.localDate, locale)}
        </Link>
        <span className="block text-sm text-ink-2">
          {calls.length > 0 ? calls.join(", ") : "nothing called any more"}
        </span>
      </p>
      <ul className="text-sm">
        {day.issues.map((issue) => (
          <li key={issue.id}>
            <Link className="text-link" href={`${base}/issues/${issue.id}`}>
              Issue {issue.number}
            </Link>{" "}
            <span className="text-ink-2">
              sent {dayAndClock(issue.issuedAt, zone, locale)}
              {showReading &&
                `, ${String(issue.acknowledged)} of ${String(issue.concerns)} have read it`}
            </span>
          </li>
        ))}
      </ul>
      <p>
        {day.issues.length === 0 ? (
          <Chip tone="stretch">Not issued</Chip>
        ) : (
          <Chip tone="fits">Issued</Chip>
        )}
      </p>
    </li>
  );
}
