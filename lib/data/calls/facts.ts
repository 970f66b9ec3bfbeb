import "server-only";
import { and, asc, eq, gt, inArray, isNull, lt, ne } from "drizzle-orm";
import { db } from "@/db/client";
import { conflicts, people, positions, rooms, travelTimes, venues } from "@/db/schema";
import type { CallFacts, CallPlan } from "@/lib/calls/types";
import type { ProductionScope } from "@/lib/data/guard";
import type { Interval } from "@/lib/schedule/types";
import { toInstant } from "@/lib/schedule/to-instant";
import { localDay } from "@/lib/format-dates";
import { readEngagements } from "./engagements";
import { readRoomHolders } from "./room-holders";

const DAY = 86_400_000;
/** Between these hours a nearer start is looked for (common practice, no source). */
const EARLIEST = "08:00";
const LATEST = "23:00";

/**
 * Everything these calls could clash with: the conflicts and engagements of everyone in them, the company's rooms and
 * who holds them, ways between venues, and who else could play. With `castHidden`, whom the score calls in this
 * production's drafts is not counted. Asks no permission: the caller has.
 */
export async function readFacts(
  scope: ProductionScope,
  plans: readonly CallPlan[],
  { castHidden = false }: { castHidden?: boolean } = {},
): Promise<CallFacts> {
  const window = {
    from: new Date(Math.min(...plans.map((plan) => plan.from.getTime())) - DAY),
    to: new Date(Math.max(...plans.map((plan) => plan.to.getTime())) + DAY),
  };
  const pianists = await readAccompanists(scope);
  const ids = [
    ...new Set([
      ...pianists.map(({ personId }) => personId),
      ...plans.flatMap((plan) => [
        ...plan.blocks.flatMap((block) => block.called.map(({ personId }) => personId)),
        ...[plan.leaderId, plan.pianistId].filter((id) => id !== null),
      ]),
    ]),
  ];
  const records =
    ids.length === 0
      ? []
      : await db
          .select({ id: people.id, name: people.name, userId: people.userId })
          .from(people)
          .where(and(inArray(people.id, ids), eq(people.companyId, scope.companyId)));
  const keys = new Map(records.map((person) => [person.id, person.userId ?? person.id]));
  const [saidNo, engagements, bookings, places, travel] = await Promise.all([
    ids.length === 0 ? [] : readConflicts(ids, window),
    readEngagements(scope, keys, window, castHidden),
    readRoomHolders(scope.companyId, window),
    readRooms(scope.companyId),
    readTravel(scope.companyId),
  ]);
  return {
    keys,
    names: new Map(records.map((person) => [person.id, person.name])),
    conflicts: saidNo,
    engagements,
    bookings,
    rooms: places,
    travel,
    pianists,
  };
}

async function readConflicts(
  personIds: string[],
  window: Interval,
): Promise<CallFacts["conflicts"]> {
  const rows = await db
    .select({
      id: conflicts.id,
      personId: conflicts.personId,
      from: conflicts.startsAt,
      to: conflicts.endsAt,
      reason: conflicts.reason,
      state: conflicts.state,
    })
    .from(conflicts)
    .where(
      and(
        inArray(conflicts.personId, personIds),
        isNull(conflicts.removedAt),
        ne(conflicts.state, "declined"),
        lt(conflicts.startsAt, window.to),
        gt(conflicts.endsAt, window.from),
      ),
    )
    .orderBy(asc(conflicts.startsAt));
  return rows.map((row) => ({
    ...row,
    state: row.state === "agreed" ? "agreed" : "asked",
    person: row.personId,
  }));
}

/** The company's rooms, by venue and name. */
export async function readRooms(companyId: string): Promise<CallFacts["rooms"]> {
  return db
    .select({
      id: rooms.id,
      name: rooms.name,
      venueId: rooms.venueId,
      venueName: venues.name,
      hasPiano: rooms.hasPiano,
    })
    .from(rooms)
    .innerJoin(venues, eq(venues.id, rooms.venueId))
    .where(eq(rooms.companyId, companyId))
    .orderBy(asc(venues.name), asc(rooms.name));
}

async function readTravel(companyId: string): Promise<CallFacts["travel"]> {
  return db
    .select({ a: travelTimes.venueA, b: travelTimes.venueB, minutes: travelTimes.minutes })
    .from(travelTimes)
    .innerJoin(venues, eq(venues.id, travelTimes.venueA))
    .where(eq(venues.companyId, companyId));
}

/** The production's accompanists, by name. */
export async function readAccompanists(scope: ProductionScope): Promise<CallFacts["pianists"]> {
  return db
    .select({ personId: people.id, name: people.name })
    .from(positions)
    .innerJoin(people, eq(people.id, positions.personId))
    .where(
      and(
        eq(positions.productionId, scope.id),
        eq(positions.kind, "accompanist"),
        isNull(positions.endedAt),
        isNull(people.removedAt),
      ),
    )
    .orderBy(asc(people.name));
}

/** The hours of the call's own day in which another start may be proposed; never one that is past. */
export function startsWithin(plan: CallPlan): Interval {
  const day = localDay(plan.from, plan.zone);
  const opens = toInstant(day, EARLIEST, plan.zone).instant;
  const now = new Date();
  return {
    from: opens < now && plan.from > now ? now : opens,
    to: toInstant(day, LATEST, plan.zone).instant,
  };
}
