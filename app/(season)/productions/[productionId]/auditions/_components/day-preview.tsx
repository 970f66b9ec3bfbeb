import { layOutDay } from "@/lib/auditions/lay-out-day";
import type { DayChoices } from "@/lib/data/auditions/days";
import { clockSpan } from "@/lib/format-dates";
import type { DayFields } from "./day-fields";

const whole = (text: string): number => (text.trim() === "" ? Number.NaN : Number(text));

/** How many slots follow from what is typed, room by room, before anything is saved. */
export function DayPreview({ values, choices }: { values: DayFields; choices: DayChoices }) {
  if (values.localDate === "" || values.rooms.length === 0) {
    return (
      <p role="status" className="border-y border-rule py-3 text-ink-2">
        Choose a day and a room, and the number of slots stands here.
      </p>
    );
  }
  const result = layOutDay(
    {
      localDate: values.localDate,
      slotMinutes: whole(values.slotMinutes),
      restAfterMinutes: whole(values.restAfterMinutes),
      restMinutes: whole(values.restMinutes),
      lunchMinutes: whole(values.lunchMinutes),
      lunchFrom: values.lunchFrom === "" ? null : values.lunchFrom,
      lunchTo: values.lunchTo === "" ? null : values.lunchTo,
      hold: values.hold,
      rooms: values.rooms,
    },
    choices.zone,
  );
  const name = (roomId: string): string =>
    choices.rooms.find((room) => room.id === roomId)?.name ?? "Room";
  if (!result.ok) {
    return (
      <p role="status" className="border-y border-rule py-3 text-vermilion">
        {result.roomId === null ? "" : `${name(result.roomId)}: `}
        {result.message}
      </p>
    );
  }
  const count = (kind: string) =>
    result.rooms.reduce(
      (sum, room) => sum + room.items.filter((item) => item.kind === kind).length,
      0,
    );
  const holds = count("hold");
  return (
    <div role="status" className="border-y border-rule py-3">
      <p>
        <strong className="font-serif text-2xl font-medium">{count("slot")}</strong> slots
        {holds > 0 && `, and ${String(holds)} held for late-comers`}
      </p>
      <ul className="mt-1 text-sm text-ink-2">
        {result.rooms.map((room) => {
          const pauses = room.items.filter((item) => item.kind === "rest" || item.kind === "lunch");
          return (
            <li key={room.roomId}>
              {name(room.roomId)}: {room.items.filter((item) => item.kind === "slot").length} slots
              {pauses
                .map((pause) => `, ${pause.kind} ${clockSpan(pause.from, pause.to, choices.zone)}`)
                .join("")}
            </li>
          );
        })}
      </ul>
    </div>
  );
}
