import "server-only";
import { and, asc, eq, inArray, or } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import { rooms, travelTimes, venues } from "@/db/schema";
import { AppError } from "@/lib/errors";
import { groupBy } from "@/lib/group-by";
import type { Actor } from "@/lib/permissions/types";
import type {
  addRoomSchema,
  addVenueSchema,
  changeRoomSchema,
  changeVenueSchema,
  setTravelSchema,
} from "@/lib/schemas/rooms";
import { recordAudit } from "./audit";
import { companyFor, productionFor } from "./guard";
import { duplicateKey, inTransaction } from "./transaction";

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

export type VenueListed = {
  id: string;
  name: string;
  address: string;
  rooms: { id: string; name: string; hasPiano: boolean }[];
};

export type CompanyRooms = {
  company: { id: string; name: string };
  venues: VenueListed[];
  /** Minutes between two venues, each pair once, `a` before `b` in the order of ids. */
  travel: { a: string; b: string; minutes: number }[];
};

/** The company's venues with their rooms, by name, and the ways between them. For those who look after rooms. */
export async function readRooms(actor: Actor, companyId: string): Promise<CompanyRooms> {
  const company = await companyFor(actor, companyId, "rooms:manage");
  const [venueRows, roomRows] = await Promise.all([
    db
      .select({ id: venues.id, name: venues.name, address: venues.address })
      .from(venues)
      .where(eq(venues.companyId, company.id))
      .orderBy(asc(venues.name)),
    db
      .select({ id: rooms.id, venueId: rooms.venueId, name: rooms.name, hasPiano: rooms.hasPiano })
      .from(rooms)
      .where(eq(rooms.companyId, company.id))
      .orderBy(asc(rooms.name)),
  ]);
  const ids = venueRows.map((venue) => venue.id);
  const travel =
    ids.length === 0
      ? []
      : await db
          .select({ a: travelTimes.venueA, b: travelTimes.venueB, minutes: travelTimes.minutes })
          .from(travelTimes)
          .where(and(inArray(travelTimes.venueA, ids), inArray(travelTimes.venueB, ids)));
  const byVenue = groupBy(roomRows, (row) => row.venueId);
  return {
    company: { id: company.id, name: company.name },
    venues: venueRows.map((venue) => ({
      ...venue,
      rooms: (byVenue.get(venue.id) ?? []).map(({ venueId: _, ...room }) => room),
    })),
    travel,
  };
}

/** A new venue of the company. Returns its id. Throws `invalid` beside the name when there is one of that name. */
export async function addVenue(
  actor: Actor,
  input: z.output<typeof addVenueSchema>,
): Promise<string> {
  const company = await companyFor(actor, input.companyId, "rooms:manage");
  const id = newId();
  await named("a venue", () =>
    inTransaction(async (tx) => {
      await tx
        .insert(venues)
        .values({ id, companyId: company.id, name: input.name, address: input.address });
      await recordAudit(tx, actor, {
        companyId: company.id,
        action: "venue.add",
        subjectKind: "venue",
        subjectId: id,
        summary: `Added the venue ${input.name}`,
      });
    }),
  );
  return id;
}

export async function changeVenue(
  actor: Actor,
  input: z.output<typeof changeVenueSchema>,
): Promise<void> {
  const company = await companyFor(actor, input.companyId, "rooms:manage");
  await named("a venue", () =>
    inTransaction(async (tx) => {
      const [done] = await tx
        .update(venues)
        .set({ name: input.name, address: input.address })
        .where(and(eq(venues.id, input.venueId), eq(venues.companyId, company.id)));
      if (done.affectedRows === 0) throw new AppError("not-found");
      await recordAudit(tx, actor, {
        companyId: company.id,
        action: "venue.change",
        subjectKind: "venue",
        subjectId: input.venueId,
        summary: `Changed the venue ${input.name}`,
      });
    }),
  );
}

/** A new room in a venue of the company. Returns its id. */
export async function addRoom(
  actor: Actor,
  input: z.output<typeof addRoomSchema>,
): Promise<string> {
  const company = await companyFor(actor, input.companyId, "rooms:manage");
  const id = newId();
  await named("a room", () =>
    inTransaction(async (tx) => {
      const [venue] = await tx
        .select({ id: venues.id, name: venues.name })
        .from(venues)
        .where(and(eq(venues.id, input.venueId), eq(venues.companyId, company.id)));
      if (!venue) throw new AppError("not-found");
      await tx.insert(rooms).values({
        id,
        companyId: company.id,
        venueId: venue.id,
        name: input.name,
        hasPiano: input.hasPiano,
      });
      await recordAudit(tx, actor, {
        companyId: company.id,
        action: "room.add",
        subjectKind: "room",
        subjectId: id,
        summary: `Added ${input.name} at ${venue.name}`,
      });
    }),
  );
  return id;
}

export async function changeRoom(
  actor: Actor,
  input: z.output<typeof changeRoomSchema>,
): Promise<void> {
  const company = await companyFor(actor, input.companyId, "rooms:manage");
  await named("a room", () =>
    inTransaction(async (tx) => {
      const [done] = await tx
        .update(rooms)
        .set({ name: input.name, hasPiano: input.hasPiano })
        .where(and(eq(rooms.id, input.roomId), eq(rooms.companyId, company.id)));
      if (done.affectedRows === 0) throw new AppError("not-found");
      await recordAudit(tx, actor, {
        companyId: company.id,
        action: "room.change",
        subjectKind: "room",
        subjectId: input.roomId,
        summary: `Changed ${input.name}: ${input.hasPiano ? "with" : "without"} a piano`,
      });
    }),
  );
}

/**
 * Writes the minutes between venues, whichever of a pair was named first; null takes a way back. Pairs not named stay
 * as they are. All or nothing: a venue of another company refuses the lot.
 */
export async function setTravel(
  actor: Actor,
  input: z.output<typeof setTravelSchema>,
): Promise<void> {
  const company = await companyFor(actor, input.companyId, "rooms:manage");
  const pairs = input.pairs.map(({ a, b, minutes }) =>
    a < b ? { a, b, minutes } : { a: b, b: a, minutes },
  );
  if (pairs.some(({ a, b }) => a === b)) {
    throw new AppError("invalid", "A way leads from one venue to another one.");
  }
  if (pairs.length === 0) return;
  await inTransaction(async (tx) => {
    const known = await tx
      .select({ id: venues.id })
      .from(venues)
      .where(eq(venues.companyId, company.id));
    const ids = new Set(known.map((venue) => venue.id));
    if (pairs.some(({ a, b }) => !ids.has(a) || !ids.has(b))) throw new AppError("not-found");
    await tx
      .delete(travelTimes)
      .where(
        or(...pairs.map(({ a, b }) => and(eq(travelTimes.venueA, a), eq(travelTimes.venueB, b)))),
      );
    const once = new Map(pairs.map((pair) => [`${pair.a} ${pair.b}`, pair]));
    const rows = [...once.values()].flatMap(({ a, b, minutes }) =>
      minutes === null ? [] : [{ venueA: a, venueB: b, minutes }],
    );
    if (rows.length > 0) await tx.insert(travelTimes).values(rows);
    await recordAudit(tx, actor, {
      companyId: company.id,
      action: "travel.set",
      subjectKind: "company",
      subjectId: company.id,
      summary: "Changed the travel times between venues",
    });
  });
}

/** A name that is there already is said beside its field. */
async function named(what: string, work: () => Promise<void>): Promise<void> {
  try {
    await work();
  } catch (error) {
    const key = duplicateKey(error);
    if (key !== "venues_company_name" && key !== "rooms_venue_name") throw error;
    throw new AppError("invalid", undefined, {
      fields: { name: `There is ${what} of this name already. Choose another name.` },
    });
  }
}
