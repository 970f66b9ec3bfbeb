import { findClashes } from "@/lib/schedule/find-clashes";
import { minutesBetween } from "@/lib/schedule/minutes-between";
import type { Clash, ScheduledCall } from "@/lib/schedule/types";
import { attendingRuns } from "./attending-runs";
import type { CallFacts, CallPlan, FoundClash } from "./types";

const WHOLE = "own";
const isOwn = (id: string): boolean => id === WHOLE || id.startsWith(`${WHOLE} `);

/**
 * What one call clashes with: the conflicts and other engagements of everyone it needs, the room's other
 * bookings, and ways too long between venues. Singers are looked at only while they are needed; the
 * leader and the pianist for the whole call. The call's own saved state does not count against it.
 * Several stretches with the same thing are one clash; sorted by time.
 */
export function findCallClashes(plan: CallPlan, facts: CallFacts): FoundClash[] {
  const keyOf = (personId: string): string => facts.keys.get(personId) ?? personId;
  const venue = facts.rooms.find((room) => room.id === plan.roomId)?.venueId;
  const { leaderId, pianistId } = plan;

  const own: ScheduledCall[] = [
    {
      id: WHOLE,
      from: plan.from,
      to: plan.to,
      people: leaderId !== null && leaderId !== pianistId ? [keyOf(leaderId)] : [],
      room: plan.roomId ?? undefined,
      venue,
      pianist: pianistId === null ? undefined : keyOf(pianistId),
    },
  ];
  const personOf = new Map<string, string>();
  for (const personId of [leaderId, pianistId]) {
    if (personId !== null) personOf.set(keyOf(personId), personId);
  }
  for (const [personId, runs] of attendingRuns(plan.blocks)) {
    if (personOf.has(keyOf(personId))) continue;
    personOf.set(keyOf(personId), personId);
    for (const [index, run] of runs.entries()) {
      own.push({ id: `${WHOLE} ${personId} ${index}`, ...run, people: [keyOf(personId)], venue });
    }
  }

  const isOther = (callId: string | null): boolean => callId === null || callId !== plan.callId;
  const others: ScheduledCall[] = facts.engagements
    .filter((engagement) => isOther(engagement.callId) && personOf.has(engagement.who))
    .map(({ id, from, to, who, plays, venueId }) => ({
      id,
      from,
      to,
      people: plays ? [] : [who],
      pianist: plays ? who : undefined,
      venue: venueId ?? undefined,
    }));
  const held: ScheduledCall[] = facts.bookings.flatMap((booking, index) =>
    booking.roomId === plan.roomId && isOther(booking.callId)
      ? [
          {
            id: `room ${index}`,
            from: booking.from,
            to: booking.to,
            people: [],
            room: booking.roomId,
          },
        ]
      : [],
  );
  const conflicts = facts.conflicts
    .filter((conflict) => personOf.has(keyOf(conflict.personId)))
    .map(({ id, from, to, personId }) => ({ id, from, to, person: keyOf(personId) }));

  const found = new Map<string, FoundClash>();
  for (const clash of findClashes({
    calls: [...own, ...others, ...held],
    conflicts,
    travel: facts.travel,
  })) {
    const withId = otherSide(clash);
    if (withId === null) continue;
    const personId = clash.kind === "room" ? null : (personOf.get(clash.who) ?? null);
    const minutes = clash.short ?? minutesBetween(clash.from, clash.to);
    const name = `${clash.kind} ${clash.who} ${withId}`;
    const seen = found.get(name);
    found.set(name, {
      kind: clash.kind,
      personId,
      withId,
      from: seen && seen.from < clash.from ? seen.from : clash.from,
      to: seen && seen.to > clash.to ? seen.to : clash.to,
      minutes: (seen?.minutes ?? 0) + minutes,
    });
  }
  return [...found.values()].sort((a, b) => a.from.getTime() - b.from.getTime());
}

/** The side of a clash that is not this call; null when the call has no part in it. */
function otherSide(clash: Clash): string | null {
  if (!clash.calls.some(isOwn)) return null;
  if (clash.kind === "conflict") return clash.conflict ?? null;
  return clash.calls.find((id) => !isOwn(id)) ?? null;
}
