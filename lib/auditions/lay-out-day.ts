import { buildSlots } from "@/lib/schedule/build-slots";
import { toInstant } from "@/lib/schedule/to-instant";
import type { DayItem } from "@/lib/schedule/types";

/** An audition day as people describe it: local times "HH:MM" on the day's own clock, lengths in minutes. */
export type DayPlan = {
  localDate: string;
  slotMinutes: number;
  restAfterMinutes: number;
  /** 0: the pianist needs no rest of their own. */
  restMinutes: number;
  /** 0: no lunch. */
  lunchMinutes: number;
  lunchFrom: string | null;
  lunchTo: string | null;
  /** Keeps one slot an hour free for late-comers. */
  hold: boolean;
  rooms: readonly { roomId: string; opens: string; closes: string }[];
};

export type RoomLaidOut = { roomId: string; opensAt: Date; closesAt: Date; items: DayItem[] };

/** `message` says what stands in the way of a room's day and what to change. */
export type DayLaidOut =
  { ok: true; rooms: RoomLaidOut[] } | { ok: false; roomId: string | null; message: string };

/**
 * Lays out every room of an audition day in its zone: slots, rests, lunch and holds (see `buildSlots`).
 * Pure, so that the form shows the same figures as the server saves. Returns a reason instead of
 * throwing for a date, time or zone that does not exist.
 */
export function layOutDay(plan: DayPlan, zone: string): DayLaidOut {
  const rooms: RoomLaidOut[] = [];
  for (const room of plan.rooms) {
    try {
      const at = (time: string): Date => toInstant(plan.localDate, time, zone).instant;
      const opens = at(room.opens);
      const closes = at(room.closes);
      const result = buildSlots({
        opens,
        closes,
        slotMinutes: plan.slotMinutes,
        ...(plan.restMinutes > 0 && {
          rest: { afterMinutes: plan.restAfterMinutes, restMinutes: plan.restMinutes },
        }),
        ...(plan.lunchMinutes > 0 &&
          plan.lunchFrom !== null &&
          plan.lunchTo !== null && {
            lunch: {
              minutes: plan.lunchMinutes,
              windowFrom: at(plan.lunchFrom),
              windowTo: at(plan.lunchTo),
            },
          }),
        ...(plan.hold && { holdEveryMinutes: 60 }),
      });
      if (!result.ok) return { ok: false, roomId: room.roomId, message: result.message };
      rooms.push({ roomId: room.roomId, opensAt: opens, closesAt: closes, items: result.items });
    } catch (error) {
      if (error instanceof RangeError)
        return {
          ok: false,
          roomId: room.roomId,
          message: "Choose a day and write the times like 10:00.",
        };
      throw error;
    }
  }
  return { ok: true, rooms };
}
