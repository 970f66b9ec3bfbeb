import "server-only";
import { and, eq, gt, inArray, isNull, lt, ne } from "drizzle-orm";
import { db } from "@/db/client";
import { conflicts, people, rooms, travelTimes } from "@/db/schema";
import { groupBy } from "@/lib/group-by";
import type { Actor } from "@/lib/permissions/types";
import { findClashes } from "@/lib/schedule/find-clashes";
import type { Clash, Interval } from "@/lib/schedule/types";
import { readElsewhere } from "./elsewhere";
import type { Held, OwnElsewhere, SeasonClash, SeasonEvent, SeasonProduction } from "./types";

type Input = {
  actor: Actor;
  productions: readonly SeasonProduction[];
  events: readonly SeasonEvent[];
  held: readonly Held[];
  window: Interval;
};

/**
 * What cannot stand among the events, as far as it is the actor's to mend or their own. People are told apart by login where they have one, so that one person in two
 * companies is found; of what they do in productions the actor may not see, only the time is used.
 */
export async function readClashes(
  input: Input,
): Promise<{ clashes: SeasonClash[]; elsewhere: OwnElsewhere[] }> {
  const { actor, productions, events, held, window } = input;
  const personIds = unique(held.map((h) => h.personId));
  const roomIds = unique(held.map((h) => h.roomId));
  const venueIds = unique(held.map((h) => h.venueId));
  const [personRows, roomRows, travel] = await Promise.all([
    personIds.length === 0
      ? []
      : db
          .select({
            id: people.id,
            userId: people.userId,
            name: people.name,
            companyId: people.companyId,
          })
          .from(people)
          .where(inArray(people.id, personIds)),
    roomIds.length === 0
      ? []
      : db.select({ id: rooms.id, name: rooms.name }).from(rooms).where(inArray(rooms.id, roomIds)),
    venueIds.length === 0
      ? []
      : db
          .select({ a: travelTimes.venueA, b: travelTimes.venueB, minutes: travelTimes.minutes })
          .from(travelTimes)
          .where(inArray(travelTimes.venueA, venueIds)),
  ]);
  const login = new Map(personRows.map((row) => [row.id, row.userId ?? row.id]));
  const name = new Map<string, string>([
    ...roomRows.map((row) => [row.id, row.name] as const),
    ...personRows.map((row) => [row.userId ?? row.id, row.name] as const),
    [actor.userId, "You"],
  ]);
  const logins = unique([...personRows.map((row) => row.userId), actor.userId]);
  const [away, said] = await Promise.all([
    readElsewhere(
      logins,
      productions.map((p) => p.id),
      window,
    ),
    readConflicts(productions, personRows, window),
  ]);

  const stretches = held.map((stretch, index) => ({
    id: String(index),
    eventId: stretch.eventId,
    from: stretch.from,
    to: stretch.to,
    people: stretch.personId === null ? [] : [login.get(stretch.personId) ?? stretch.personId],
    ...(stretch.roomId === null ? {} : { room: stretch.roomId }),
    ...(stretch.venueId === null ? {} : { venue: stretch.venueId }),
  }));
  const others = away.map((time, index) => ({
    id: `away ${String(index)}`,
    eventId: null,
    from: time.from,
    to: time.to,
    people: [time.login],
  }));
  const eventOf = new Map([...stretches, ...others].map((s) => [s.id, s.eventId]));
  const companyOf = new Map(
    events.map((event) => [
      event.id,
      productions.find((p) => p.id === event.productionId)?.companyId,
    ]),
  );
  const found = findClashes({
    calls: [...stretches, ...others],
    conflicts: said.map((conflict) => ({
      // Which company it was told to is all that is asked of it below.
      id: conflict.companyId,
      person: login.get(conflict.personId) ?? conflict.personId,
      from: conflict.from,
      to: conflict.to,
    })),
    travel,
  });
  const mayKnow = new Set(productions.filter((p) => p.sees.conflicts).map((p) => p.id));
  const planned = new Set(productions.filter((p) => p.plans).map((p) => p.id));
  const productionOf = new Map(events.map((event) => [event.id, event.productionId]));
  const standing = found.flatMap((clash) => {
    const sides = clash.calls.map((id) => eventOf.get(id) ?? null);
    const eventIds = sides.filter((id) => id !== null);
    const [first] = eventIds;
    if (first === undefined || (eventIds.length === 2 && eventIds[1] === first)) return [];
    // Clashes are for those who plan one of the calls, and for the person themselves.
    if (
      clash.who !== actor.userId &&
      !eventIds.some((id) => planned.has(productionOf.get(id) ?? ""))
    )
      return [];
    if (clash.kind === "conflict") {
      // A conflict was told to one company, and is for those of its productions who plan calls.
      if (clash.conflict !== companyOf.get(first)) return [];
      if (!mayKnow.has(productionOf.get(first) ?? "")) return [];
    }
    return [{ clash, eventIds, elsewhere: sides.includes(null) }];
  });
  const zoneOf = new Map(events.map((event) => [event.id, event.zone]));
  const merged = groupBy(standing, (s) => `${s.clash.kind} ${s.eventIds.join(" ")} ${keyOf(s)}`);
  return {
    clashes: [...merged.entries()].flatMap(([id, group]) => {
      const [first] = group;
      if (!first) return [];
      const times = group.map((s) => s.clash);
      return [
        {
          id,
          kind: first.clash.kind,
          who: namesOf(times, name),
          from: new Date(Math.min(...times.map((t) => t.from.getTime()))),
          to: new Date(Math.max(...times.map((t) => t.to.getTime()))),
          zone: zoneOf.get(first.eventIds[0] ?? "") ?? "UTC",
          eventIds: first.eventIds,
          elsewhere: first.elsewhere,
          short: times.reduce<number | null>(
            (most, t) => (t.short === undefined ? most : Math.max(t.short, most ?? 0)),
            null,
          ),
        },
      ];
    }),
    elsewhere: away
      .filter((time) => time.login === actor.userId)
      .sort((a, b) => a.from.getTime() - b.from.getTime())
      .map(({ login: _, ...time }, index) => ({ ...time, id: `elsewhere ${String(index)}` })),
  };
}

/** One entry for all the people of a pair of events; apart where only one side is known. */
function keyOf(standing: { clash: Clash; elsewhere: boolean }): string {
  return standing.elsewhere || standing.clash.kind === "conflict" ? standing.clash.who : "";
}

function namesOf(clashes: readonly Clash[], name: ReadonlyMap<string, string>): string[] {
  const names = unique(clashes.map((clash) => name.get(clash.who) ?? "Someone"));
  return names.sort(
    (a, b) => Number(b === "You") - Number(a === "You") || a.localeCompare(b, "en"),
  );
}

function unique(ids: readonly (string | null)[]): string[] {
  return [...new Set(ids.filter((id) => id !== null))];
}

/** When the people of productions whose conflicts the actor may read cannot attend; what was declined does not count. */
async function readConflicts(
  productions: readonly SeasonProduction[],
  personRows: readonly { id: string; companyId: string }[],
  window: Interval,
) {
  const companies = new Set(productions.filter((p) => p.sees.conflicts).map((p) => p.companyId));
  const ids = personRows.filter((row) => companies.has(row.companyId)).map((row) => row.id);
  if (ids.length === 0) return [];
  const rows = await db
    .select({
      personId: conflicts.personId,
      companyId: people.companyId,
      from: conflicts.startsAt,
      to: conflicts.endsAt,
    })
    .from(conflicts)
    .innerJoin(people, eq(people.id, conflicts.personId))
    .where(
      and(
        inArray(conflicts.personId, ids),
        isNull(conflicts.removedAt),
        ne(conflicts.state, "declined"),
        lt(conflicts.startsAt, window.to),
        gt(conflicts.endsAt, window.from),
      ),
    );
  return rows;
}
