import "server-only";
import { desc, eq } from "drizzle-orm";
import { db } from "@/db/client";
import { callbackRounds, rooms, venues } from "@/db/schema";

export type Round = {
  id: string;
  title: string;
  startsAt: Date | null;
  endsAt: Date | null;
  zone: string;
  roomId: string | null;
  room: string | null;
  material: string | null;
  /** How often the list has gone out; 0 while it is a draft. */
  issue: number;
  publishedAt: Date | null;
  version: number;
};

/** The newest round of a production. Asks no permission: the caller has. */
export async function latestRound(productionId: string): Promise<Round | null> {
  const [row] = await db
    .select({
      id: callbackRounds.id,
      title: callbackRounds.title,
      startsAt: callbackRounds.startsAt,
      endsAt: callbackRounds.endsAt,
      zone: callbackRounds.zone,
      roomId: callbackRounds.roomId,
      roomName: rooms.name,
      venueName: venues.name,
      material: callbackRounds.material,
      issue: callbackRounds.issue,
      publishedAt: callbackRounds.publishedAt,
      version: callbackRounds.version,
    })
    .from(callbackRounds)
    .leftJoin(rooms, eq(rooms.id, callbackRounds.roomId))
    .leftJoin(venues, eq(venues.id, rooms.venueId))
    .where(eq(callbackRounds.productionId, productionId))
    .orderBy(desc(callbackRounds.id))
    .limit(1);
  if (!row) return null;
  const { roomName, venueName, ...round } = row;
  return { ...round, room: roomName === null ? null : `${roomName}, ${venueName ?? ""}` };
}
