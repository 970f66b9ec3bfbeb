import "server-only";
import { asc, eq } from "drizzle-orm";
import { db } from "@/db/client";
import { rooms, venues } from "@/db/schema";
import type { Actor } from "@/lib/permissions/types";
import { productionFor } from "./guard";

export type RoomChoice = { id: string; name: string; venue: string };

/** The rooms of the production's company by venue, to choose from. For everyone who may see the production. */
export async function roomsOfProduction(actor: Actor, productionId: string): Promise<RoomChoice[]> {
  const scope = await productionFor(actor, productionId, "production:see");
  return db
    .select({ id: rooms.id, name: rooms.name, venue: venues.name })
    .from(rooms)
    .innerJoin(venues, eq(venues.id, rooms.venueId))
    .where(eq(rooms.companyId, scope.companyId))
    .orderBy(asc(venues.name), asc(rooms.name));
}
