import { queryOptions } from "@tanstack/react-query";
import type { AuditionDayView, ItemOnDay, SingerOnDay } from "@/lib/auditions/day-view";
import type { DoorView } from "@/lib/auditions/door-view";
import { readJson } from "./read-json";

/** One audition day, read again every few seconds while it is looked at. */
export function auditionDayQuery(productionId: string, dayId: string) {
  return queryOptions({
    queryKey: ["audition-day", dayId],
    queryFn: () => readJson<AuditionDayView>(`/api/productions/${productionId}/auditions/${dayId}`),
    refetchInterval: 5_000,
  });
}

/** The running order behind a monitor's link. */
export function doorQuery(token: string) {
  return queryOptions({
    queryKey: ["door", token],
    queryFn: () => readJson<DoorView>(`/api/door/${encodeURIComponent(token)}`),
    refetchInterval: 3_000,
  });
}

/** A slot of the day by its id, with the room it is in. */
export function findSlot(
  day: AuditionDayView,
  slotId: string,
): { item: ItemOnDay; room: AuditionDayView["rooms"][number] } | null {
  for (const room of day.rooms) {
    const item = room.items.find((i) => i.id === slotId);
    if (item) return { item, room };
  }
  return null;
}

/** Where a singer is on the day: the slot's id, or null while they wait. */
export function slotOfSinger(day: AuditionDayView, signUpId: string): string | null {
  return (
    day.rooms.flatMap((room) => room.items).find((item) => item.singer?.signUpId === signUpId)
      ?.id ?? null
  );
}

/** The day as it will be once a singer stands in `slotId` (null: waits again); whoever was there takes their place. */
export function withSingerMoved(
  day: AuditionDayView,
  signUpId: string,
  slotId: string | null,
): AuditionDayView {
  const from = slotOfSinger(day, signUpId);
  const everyone = [
    ...day.waiting,
    ...day.rooms.flatMap((room) => room.items.flatMap((item) => item.singer ?? [])),
  ];
  const singer = everyone.find((s) => s.signUpId === signUpId);
  if (!singer || from === slotId) return day;
  const other = slotId === null ? null : (findSlot(day, slotId)?.item.singer ?? null);
  const seat = (item: ItemOnDay): SingerOnDay | null =>
    item.id === slotId ? singer : item.id === from ? other : item.singer;
  const waiting = day.waiting.filter((s) => s.signUpId !== signUpId);
  if (slotId === null) waiting.push(singer);
  if (from === null && other !== null) waiting.push(other);
  return {
    ...day,
    waiting,
    rooms: day.rooms.map((room) => ({
      ...room,
      items: room.items.map((item) => ({ ...item, singer: seat(item) })),
    })),
  };
}
