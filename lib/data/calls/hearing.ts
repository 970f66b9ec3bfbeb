import "server-only";
import { and, eq, gt, inArray, isNotNull, isNull, lt } from "drizzle-orm";
import { db } from "@/db/client";
import {
  auditionDays,
  auditionRooms,
  callbackRounds,
  positions,
  productions,
  rooms,
} from "@/db/schema";
import type { Engagement } from "@/lib/calls/types";
import type { Interval } from "@/lib/schedule/types";

/**
 * Auditions and callbacks that these people hear because they direct the music of that production. `records` are the
 * companies' records, each with the login that cannot be in two places; what another company does is only "is engaged".
 */
export async function hearingElsewhere(
  records: Map<string, string>,
  companyId: string,
  window: Interval,
): Promise<Omit<Engagement, "id">[]> {
  const leads = and(
    inArray(positions.personId, [...records.keys()]),
    inArray(positions.kind, ["music_director", "assistant_md"]),
    isNull(positions.endedAt),
    isNull(productions.removedAt),
  );
  const columns = {
    personId: positions.personId,
    companyId: productions.companyId,
    production: productions.title,
    venueId: rooms.venueId,
  };
  const [auditions, callbacks] = await Promise.all([
    db
      .select({ ...columns, from: auditionRooms.opensAt, to: auditionRooms.closesAt })
      .from(auditionRooms)
      .innerJoin(auditionDays, eq(auditionDays.id, auditionRooms.dayId))
      .innerJoin(productions, eq(productions.id, auditionDays.productionId))
      .innerJoin(positions, eq(positions.productionId, productions.id))
      .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
      .where(
        and(
          leads,
          isNull(auditionDays.removedAt),
          lt(auditionRooms.opensAt, window.to),
          gt(auditionRooms.closesAt, window.from),
        ),
      ),
    db
      .select({ ...columns, from: callbackRounds.startsAt, to: callbackRounds.endsAt })
      .from(callbackRounds)
      .innerJoin(productions, eq(productions.id, callbackRounds.productionId))
      .innerJoin(positions, eq(positions.productionId, productions.id))
      .leftJoin(rooms, eq(rooms.id, callbackRounds.roomId))
      .where(
        and(
          leads,
          isNotNull(callbackRounds.startsAt),
          isNotNull(callbackRounds.endsAt),
          lt(callbackRounds.startsAt, window.to),
          gt(callbackRounds.endsAt, window.from),
        ),
      ),
  ]);
  const seen = new Set<string>();
  const rows = [
    ...auditions.map((row) => ({ ...row, what: "auditions" })),
    ...callbacks.map((row) => ({ ...row, what: "callbacks" })),
  ];
  return rows.flatMap(({ from, to, ...row }) => {
    if (from === null || to === null) return [];
    const who = records.get(row.personId) ?? row.personId;
    // Two rooms at once are one day of hearing.
    const key = [who, row.production, row.what, from.toISOString().slice(0, 10)].join(" ");
    if (seen.has(key)) return [];
    seen.add(key);
    const label =
      row.companyId === companyId ? `hears the ${row.what} of ${row.production}` : "is engaged";
    return [{ from, to, who, plays: false, callId: null, label, venueId: row.venueId }];
  });
}
