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
import type { ProductionScope } from "@/lib/data/guard";
import type { Interval } from "@/lib/schedule/types";

/**
 * Auditions and callbacks that these people hear because they direct the music of that production. `records` are the
 * companies' records, each with the login that cannot be in two places; what another company does is only "is engaged",
 * and so are callbacks of another production that nobody has been told of yet. An audition day is one stretch, from its
 * first room's opening to its last room's closing.
 */
export async function hearingElsewhere(
  records: Map<string, string>,
  scope: Pick<ProductionScope, "id" | "companyId">,
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
    productionId: productions.id,
    production: productions.title,
    venueId: rooms.venueId,
  };
  const [auditions, callbacks] = await Promise.all([
    db
      .select({
        ...columns,
        hearingId: auditionDays.id,
        from: auditionRooms.opensAt,
        to: auditionRooms.closesAt,
      })
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
      .select({
        ...columns,
        hearingId: callbackRounds.id,
        issue: callbackRounds.issue,
        from: callbackRounds.startsAt,
        to: callbackRounds.endsAt,
      })
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
  const rows = [
    ...auditions.map((row) => ({ ...row, what: "auditions", told: true })),
    ...callbacks.map(({ issue, ...row }) => ({ ...row, what: "callbacks", told: issue > 0 })),
  ];
  const heard = new Map<string, Omit<Engagement, "id">>();
  for (const { from, to, ...row } of rows) {
    if (from === null || to === null) continue;
    const who = records.get(row.personId) ?? row.personId;
    const key = `${who} ${row.hearingId}`;
    const known = heard.get(key);
    if (known) {
      // Two rooms at once are one day of hearing; so are two positions in the music team.
      if (from < known.from) known.from = from;
      if (to > known.to) known.to = to;
      continue;
    }
    const named = row.companyId === scope.companyId && (row.told || row.productionId === scope.id);
    const label = named ? `hears the ${row.what} of ${row.production}` : "is engaged";
    const { venueId } = row;
    heard.set(key, { from, to, who, plays: false, callId: null, label, venueId });
  }
  return [...heard.values()];
}
