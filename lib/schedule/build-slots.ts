import type { DayItem, DayItemKind, SlotPlan, SlotPlanReason, SlotPlanResult } from "./types";

const MINUTE = 60_000;

/**
 * Lays out an audition room's day: slots back to back from the opening and again after each rest, no
 * slot ever running into a rest, lunch or the closing time.
 *
 * - A rest comes as late as the pianist's playing time allows; lunch counts as one.
 * - Lunch is given when the room is open all through its window: at the first rest that falls due inside
 *   the window, or else after the last slot that still leaves room for it.
 * - A hold is the slot that completes each `holdEveryMinutes` of hearing, rests not counted.
 * - The day never ends with a rest, since nobody comes after it.
 *
 * Returns the items in order, or a reason and what to change when no slot can be made.
 */
export function buildSlots(plan: SlotPlan): SlotPlanResult {
  const refusal = refuse(plan);
  if (refusal) return refusal;

  const slot = plan.slotMinutes * MINUTE;
  const closes = plan.closes.getTime();
  const lunch = neededLunch(plan);
  const items: DayItem[] = [];
  let at = plan.opens.getTime();
  let played = 0;
  let heard = 0;
  let lunchTaken = false;

  const add = (kind: DayItemKind, length: number) => {
    items.push({ kind, from: new Date(at), to: new Date(at + length) });
    at += length;
  };

  for (;;) {
    const restDue = plan.rest !== undefined && played + plan.slotMinutes > plan.rest.afterMinutes;
    const pause = restDue && plan.rest ? plan.rest.restMinutes * MINUTE : 0;
    if (lunch && !lunchTaken) {
      const inWindow = at >= lunch.from && at <= lunch.latest;
      const lastChance = at + pause + slot > lunch.latest;
      if (lastChance || (restDue && inWindow)) {
        // Before the window opens there may be no slot left that would leave room for lunch: wait.
        at = Math.max(at, lunch.from);
        if (at + lunch.length + slot > closes) break;
        add("lunch", lunch.length);
        lunchTaken = true;
        played = 0;
        continue;
      }
    }
    if (at + pause + slot > closes) break;
    if (restDue) {
      add("rest", pause);
      played = 0;
    }
    heard += plan.slotMinutes;
    const holdEvery = plan.holdEveryMinutes ?? Infinity;
    const isHold = heard >= holdEvery;
    if (isHold) heard -= holdEvery;
    add(isHold ? "hold" : "slot", slot);
    played += plan.slotMinutes;
  }
  return items.length > 0
    ? { ok: true, items }
    : no(
        "no-slot-fits",
        "No slot fits before closing. Open earlier, close later or use a shorter slot.",
      );
}

function no(reason: SlotPlanReason, message: string): SlotPlanResult {
  return { ok: false, reason, message };
}

function refuse(plan: SlotPlan): SlotPlanResult | null {
  const { slotMinutes, rest, lunch, holdEveryMinutes } = plan;
  const minutes = [
    slotMinutes,
    rest?.afterMinutes,
    rest?.restMinutes,
    lunch?.minutes,
    holdEveryMinutes,
  ];
  if (minutes.some((value) => value !== undefined && !(Number.isInteger(value) && value > 0))) {
    return no("minutes-not-whole", "Give every length in whole minutes, above zero.");
  }
  if (holdEveryMinutes !== undefined && holdEveryMinutes < slotMinutes) {
    return no("no-slot-fits", "Every slot would be held. Hold fewer, at most every other slot.");
  }
  if (!(plan.opens < plan.closes)) {
    return no(
      "closes-before-it-opens",
      "The room closes before it opens. Change one of the times.",
    );
  }
  if (rest && slotMinutes > rest.afterMinutes) {
    return no(
      "slot-longer-than-playing-time",
      "A slot is longer than the pianist may play. Shorten the slot or let the rest come later.",
    );
  }
  if (lunch && lunch.windowFrom.getTime() + lunch.minutes * MINUTE > lunch.windowTo.getTime()) {
    return no(
      "lunch-longer-than-its-window",
      "Lunch is longer than the time it must lie in. Shorten lunch or widen the times.",
    );
  }
  return null;
}

/** A room that opens after the window has begun, or closes before it ends, leaves lunch to the pianist. */
function neededLunch({ opens, closes, lunch }: SlotPlan) {
  if (!lunch || opens > lunch.windowFrom || closes < lunch.windowTo) return null;
  const length = lunch.minutes * MINUTE;
  return { length, from: lunch.windowFrom.getTime(), latest: lunch.windowTo.getTime() - length };
}
