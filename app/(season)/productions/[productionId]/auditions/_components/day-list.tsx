import Link from "next/link";
import { Chip } from "@/components/ui/chip";
import type { DayListed } from "@/lib/data/auditions/days";
import { clockSpan, longDay } from "@/lib/format-dates";

/** The production's audition days in order, each with its rooms and how full it is. */
export function DayList({
  productionId,
  days,
  locale,
}: {
  productionId: string;
  days: readonly DayListed[];
  locale: string;
}) {
  return (
    <ul>
      {days.map((day) => {
        const free = day.slots - day.placed;
        return (
          <li
            key={day.id}
            className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 border-b border-rule py-3"
          >
            <div className="min-w-0">
              <h3 className="text-xl">
                <Link
                  href={`/productions/${productionId}/auditions/${day.id}`}
                  className="underline-offset-4 hover:underline"
                >
                  {longDay(day.localDate, locale)}
                </Link>
              </h3>
              <p className="text-sm text-ink-2">
                {day.rooms
                  .map(
                    (room) => `${room.name}, ${clockSpan(room.opensAt, room.closesAt, day.zone)}`,
                  )
                  .join(" · ")}{" "}
                · {day.slotMinutes} minutes each
              </p>
            </div>
            <div className="flex gap-2">
              <Chip tone="fits">{`${String(day.placed)} placed`}</Chip>
              <Chip tone={free > 0 ? "plain" : "stretch"}>
                {free > 0 ? `${String(free)} free` : "full"}
              </Chip>
            </div>
          </li>
        );
      })}
    </ul>
  );
}
