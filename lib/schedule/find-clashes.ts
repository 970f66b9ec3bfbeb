import type { Clash, Conflict, Interval, ScheduledCall, TravelTime } from "./types";

interface FindClashesInput {
  calls: readonly ScheduledCall[];
  conflicts?: readonly Conflict[];
  travel?: readonly TravelTime[];
}

const MINUTE = 60_000;

/**
 * Everything that cannot stand in a set of calls:
 *
 * - "person": somebody called to two calls at once, or called to one while playing for another;
 * - "pianist": one pianist playing for two calls at once; "room": one room with two calls at once;
 * - "conflict": a call, to sing or to play, in time a person says they cannot attend;
 * - "travel": somebody with fewer minutes between two calls than it takes from venue to venue.
 *
 * All times are half-open, so a call may start when another ends. Travel is the same both ways; of two
 * figures for one pair the longer counts, and an unknown pair takes no time. Sorted by time, kind, who.
 * Throws a RangeError for a call or conflict that does not end after it starts.
 *
 * One sweep per person and room over their own calls in order of start: the work grows with the calls
 * and what is found, not with all pairs.
 */
export function findClashes({ calls, conflicts = [], travel = [] }: FindClashesInput): Clash[] {
  for (const call of calls) refuseEmpty(call, `Call ${call.id}`);
  for (const conflict of conflicts) refuseEmpty(conflict, `A conflict of ${conflict.person}`);

  const inOrder = [...calls].sort(byStart);
  const attending = groupByEach(inOrder, (call) => [
    ...new Set(call.pianist === undefined ? call.people : [...call.people, call.pianist]),
  ]);
  const clashes: Clash[] = [];

  for (const [room, theirs] of groupByEach(inOrder, (call) => optional(call.room))) {
    sweepOverlaps(theirs, (a, b) => clashes.push(doubled("room", room, a, b)));
  }
  for (const [pianist, theirs] of groupByEach(inOrder, (call) => optional(call.pianist))) {
    sweepOverlaps(theirs, (a, b) => clashes.push(doubled("pianist", pianist, a, b)));
  }
  for (const [person, theirs] of attending) {
    sweepOverlaps(theirs, (a, b) => {
      if (onlyPlaysBoth(person, a, b)) return;
      clashes.push(doubled("person", person, a, b));
    });
  }
  for (const [person, theirs] of groupByEach(conflicts, (conflict) => [conflict.person])) {
    sweepConflicts(person, attending.get(person) ?? [], theirs, clashes);
  }
  sweepTravel(attending, travel, clashes);

  return clashes.sort(
    (a, b) =>
      byStart(a, b) ||
      compare(a.kind, b.kind) ||
      compare(a.who, b.who) ||
      compare(a.calls.join(" "), b.calls.join(" ")) ||
      compare(a.conflict ?? "", b.conflict ?? ""),
  );
}

function refuseEmpty(interval: Interval, name: string): void {
  if (!(interval.from < interval.to)) {
    throw new RangeError(`${name} must end after it starts.`);
  }
}

function byStart(a: Interval, b: Interval): number {
  return a.from.getTime() - b.from.getTime() || a.to.getTime() - b.to.getTime();
}

function compare(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}

function optional(value: string | undefined): string[] {
  return value === undefined ? [] : [value];
}

function groupByEach<Item>(items: readonly Item[], keys: (item: Item) => readonly string[]) {
  const groups = new Map<string, Item[]>();
  for (const item of items) {
    for (const key of keys(item)) {
      const group = groups.get(key);
      if (group) group.push(item);
      else groups.set(key, [item]);
    }
  }
  return groups;
}

/** Visits each overlapping pair once; `items` are in order of start. */
function sweepOverlaps<Item extends Interval>(
  items: readonly Item[],
  visit: (a: Item, b: Item) => void,
): void {
  for (const [index, a] of items.entries()) {
    for (let next = index + 1; next < items.length; next += 1) {
      const b = items[next];
      if (!b || b.from >= a.to) break;
      visit(a, b);
    }
  }
}

function shared(a: Interval, b: Interval): Interval {
  return { from: a.from > b.from ? a.from : b.from, to: a.to < b.to ? a.to : b.to };
}

function doubled(
  kind: "person" | "room" | "pianist",
  who: string,
  a: ScheduledCall,
  b: ScheduledCall,
): Clash {
  return { kind, who, calls: [a.id, b.id], ...shared(a, b) };
}

/** A pianist playing for both calls and called to neither is a clash of the pianist, found already. */
function onlyPlaysBoth(person: string, a: ScheduledCall, b: ScheduledCall): boolean {
  return (
    a.pianist === person &&
    b.pianist === person &&
    !(a.people.includes(person) && b.people.includes(person))
  );
}

function sweepConflicts(
  person: string,
  calls: readonly ScheduledCall[],
  conflicts: readonly Conflict[],
  clashes: Clash[],
): void {
  const items = [
    ...calls.map((call) => ({ from: call.from, to: call.to, call })),
    ...conflicts.map((conflict) => ({ from: conflict.from, to: conflict.to, conflict })),
  ].sort(byStart);
  sweepOverlaps(items, (a, b) => {
    const call = "call" in a ? a.call : "call" in b ? b.call : null;
    const conflict = "conflict" in a ? a.conflict : "conflict" in b ? b.conflict : null;
    if (!call || !conflict) return;
    clashes.push({
      kind: "conflict",
      who: person,
      calls: [call.id],
      ...(conflict.id === undefined ? {} : { conflict: conflict.id }),
      ...shared(call, conflict),
    });
  });
}

function sweepTravel(
  attending: ReadonlyMap<string, ScheduledCall[]>,
  travel: readonly TravelTime[],
  clashes: Clash[],
): void {
  const minutesOf = new Map<string, Map<string, number>>();
  let longest = 0;
  for (const { a, b, minutes } of travel) {
    for (const [here, there] of [[a, b] as const, [b, a] as const]) {
      const known = minutesOf.get(here) ?? new Map<string, number>();
      known.set(there, Math.max(minutes, known.get(there) ?? 0));
      minutesOf.set(here, known);
    }
    longest = Math.max(longest, minutes);
  }
  for (const [person, calls] of attending) {
    for (const [index, a] of calls.entries()) {
      if (a.venue === undefined) continue;
      const reach = a.to.getTime() + longest * MINUTE;
      for (let next = index + 1; next < calls.length; next += 1) {
        const b = calls[next];
        if (!b || b.from.getTime() >= reach) break;
        if (b.venue === undefined || b.venue === a.venue || b.from < a.to) continue;
        const short =
          (minutesOf.get(a.venue)?.get(b.venue) ?? 0) -
          (b.from.getTime() - a.to.getTime()) / MINUTE;
        if (short <= 0) continue;
        clashes.push({
          kind: "travel",
          who: person,
          calls: [a.id, b.id],
          from: a.to,
          to: b.from,
          short,
        });
      }
    }
  }
}
