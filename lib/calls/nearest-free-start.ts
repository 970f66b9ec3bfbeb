import { nextFree } from "@/lib/schedule/next-free";
import { overlaps } from "@/lib/schedule/overlaps";
import type { Interval } from "@/lib/schedule/types";
import { attendingRuns } from "./attending-runs";
import type { CallFacts, CallPlan } from "./types";

const STEP_MINUTES = 5;

/**
 * The start nearest to the call's own at which nobody it needs, nor its room, is taken: the whole call
 * moves, and everyone with it keeps their place in it. Starts are tried five minutes apart inside
 * `within`, where the whole call has to lie. Null when there is none.
 */
export function nearestFreeStart(plan: CallPlan, facts: CallFacts, within: Interval): Date | null {
  const start = plan.from.getTime();
  const length = plan.to.getTime() - start;
  if (within.to.getTime() - within.from.getTime() < length) return null;
  const busy = forbiddenStarts(plan, facts);
  // One millisecond stands for the start itself: what is looked for is a moment, not a length.
  const wanted = { from: plan.from, to: new Date(start + 1) };
  const found = nextFree({
    wanted,
    busy,
    within: { from: within.from, to: new Date(within.to.getTime() - length + 1) },
    stepMinutes: STEP_MINUTES,
  });
  return found?.from ?? null;
}

/** A stretch [a, b) of the call meets a busy one [x, y) exactly when it starts between x − b and y − a. */
function forbiddenStarts(plan: CallPlan, facts: CallFacts): Interval[] {
  const start = plan.from.getTime();
  const venue = facts.rooms.find((room) => room.id === plan.roomId)?.venueId ?? null;
  const keyOf = (personId: string): string => facts.keys.get(personId) ?? personId;
  const stretches = new Map<string, Interval[]>();
  for (const [personId, runs] of attendingRuns(plan.blocks)) stretches.set(keyOf(personId), runs);
  for (const personId of [plan.leaderId, plan.pianistId]) {
    if (personId !== null) stretches.set(keyOf(personId), [plan]);
  }
  const isOther = (callId: string | null): boolean => callId === null || callId !== plan.callId;
  const busyOf = (who: string): Interval[] => [
    ...facts.conflicts.filter((conflict) => keyOf(conflict.personId) === who),
    ...facts.engagements
      .filter((engagement) => engagement.who === who && isOther(engagement.callId))
      .map((engagement) => withTravel(engagement, venue, engagement.venueId, facts)),
  ];
  const forbidden: Interval[] = [];
  const forbid = (own: Interval, busy: Interval): void => {
    const from = busy.from.getTime() - (own.to.getTime() - start);
    const to = busy.to.getTime() - (own.from.getTime() - start);
    const stretch = { from: new Date(from + 1), to: new Date(to) };
    if (overlaps(stretch, stretch)) forbidden.push(stretch);
  };
  for (const [who, runs] of stretches) {
    const busy = busyOf(who);
    for (const run of runs) for (const taken of busy) forbid(run, taken);
  }
  for (const booking of facts.bookings) {
    if (booking.roomId === plan.roomId && isOther(booking.callId)) forbid(plan, booking);
  }
  return forbidden;
}

function withTravel(
  busy: Interval,
  here: string | null,
  there: string | null,
  facts: CallFacts,
): Interval {
  if (here === null || there === null || here === there) return busy;
  const minutes = facts.travel
    .filter(({ a, b }) => (a === here && b === there) || (a === there && b === here))
    .reduce((longest, way) => Math.max(longest, way.minutes), 0);
  return {
    from: new Date(busy.from.getTime() - minutes * 60_000),
    to: new Date(busy.to.getTime() + minutes * 60_000),
  };
}
