"use client";

import Link from "next/link";
import { useRouter } from "next/navigation";
import { SectionTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { Confirm } from "@/components/ui/confirm";
import { showToast } from "@/components/ui/toast-store";
import type { AuditionDayView, SingerOnDay } from "@/lib/auditions/day-view";
import { longDay } from "@/lib/format-dates";
import { removeDay } from "../../actions";
import { PlaceEveryone } from "./fill-dialog";
import { PianistsPanel } from "./pianists-panel";

type Props = {
  day: AuditionDayView;
  accompanists: readonly { personId: string; name: string }[];
  locale: string;
  onPlace: (singer: SingerOnDay) => void;
  onOpen: (singer: SingerOnDay) => void;
};

/** The plan in plain words, who waits, and who plays. */
export function DaySide({ day, accompanists, locale, onPlace, onOpen }: Props) {
  return (
    <>
      <PlanFacts day={day} locale={locale} />
      <WaitingList day={day} onPlace={onPlace} onOpen={onOpen} />
      <PianistsPanel day={day} accompanists={accompanists} />
    </>
  );
}

function PlanFacts({ day, locale }: { day: AuditionDayView; locale: string }) {
  const router = useRouter();
  const facts: [string, string][] = [
    ["Slot", `${String(day.slotMinutes)} min`],
    [
      "Pianist rests",
      day.restMinutes > 0
        ? `${String(day.restMinutes)} min after ${String(day.restAfterMinutes)}`
        : "none of their own",
    ],
    [
      "Lunch",
      day.lunchMinutes > 0
        ? `${String(day.lunchMinutes)} min, ${day.lunchFrom ?? ""}–${day.lunchTo ?? ""}`
        : "none",
    ],
    ["Hold for late-comers", day.hold ? "1 slot an hour" : "none"],
  ];
  const placed = day.rooms
    .flatMap((room) => room.items)
    .filter((item) => item.singer !== null).length;

  async function remove() {
    const result = await removeDay({ productionId: day.productionId, dayId: day.id });
    if (result.ok) router.push(`/productions/${day.productionId}/auditions`);
    else showToast({ title: result.error.message, tone: "error" });
    return result;
  }

  return (
    <section aria-labelledby="plan">
      <SectionTitle id="plan">Plan the day</SectionTitle>
      <dl className="mb-4 text-sm">
        {facts.map(([term, fact]) => (
          <div key={term} className="flex justify-between gap-4 py-1.5">
            <dt className="text-ink-2">{term}</dt>
            <dd className="text-right font-bold">{fact}</dd>
          </div>
        ))}
      </dl>
      {day.may.plan && (
        <div className="flex flex-wrap gap-3">
          <PlaceEveryone day={day} />
          <Button asChild>
            <Link href={`/productions/${day.productionId}/auditions/${day.id}/change`}>
              Change the day
            </Link>
          </Button>
          <Confirm
            trigger={<Button kind="danger">Remove the day</Button>}
            title={`Remove ${longDay(day.localDate, locale)}?`}
            confirmLabel="Remove the day"
            onConfirm={remove}
          >
            <p>
              The rooms and pianists are free again and the monitor’s link ends.{" "}
              {placed > 0 &&
                `${placed === 1 ? "One singer loses" : `${String(placed)} singers lose`} their time and ${placed === 1 ? "waits" : "wait"} for a new one; nobody is written to, so tell those who were invited.`}{" "}
              This cannot be undone.
            </p>
          </Confirm>
        </div>
      )}
    </section>
  );
}

function times(singer: SingerOnDay): string {
  if (singer.notBefore !== null && singer.notAfter !== null)
    return `, between ${singer.notBefore} and ${singer.notAfter}`;
  if (singer.notBefore !== null) return `, after ${singer.notBefore}`;
  return singer.notAfter === null ? "" : `, before ${singer.notAfter}`;
}

function WaitingList({ day, onPlace, onOpen }: Pick<Props, "day" | "onPlace" | "onOpen">) {
  return (
    <section aria-labelledby="waiting">
      <SectionTitle id="waiting" ruled>
        Waiting list
      </SectionTitle>
      {day.waiting.length === 0 && (
        <p className="py-3 text-sm text-ink-2">Nobody waits for a time.</p>
      )}
      <ul className="max-h-96 overflow-y-auto">
        {day.waiting.map((singer) => (
          <li
            key={singer.signUpId}
            className="flex min-h-11 items-center justify-between gap-3 border-b border-rule py-1 text-sm"
          >
            <button
              type="button"
              className="min-h-8 min-w-0 text-left underline-offset-4 hover:underline"
              onClick={() => onOpen(singer)}
            >
              {singer.name}
              {times(singer)}
              {singer.minor && <span className="text-ochre"> · under 18</span>}
            </button>
            {day.may.plan && (
              <Button
                size="small"
                kind="quiet"
                aria-label={`Place ${singer.name}`}
                onClick={() => onPlace(singer)}
              >
                Place
              </Button>
            )}
          </li>
        ))}
      </ul>
    </section>
  );
}
