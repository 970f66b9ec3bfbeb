import { sql } from "drizzle-orm";
import { db } from "@/db/client";
import * as t from "@/db/schema";
import { newId } from "@/db/columns";
import { env } from "@/lib/env";
import type { PositionKind } from "@/lib/permissions/types";

export type TestPerson = { userId: string; personId: string; email: string; name: string };

export type World = Awaited<ReturnType<typeof makeWorld>>;

const TABLES = [
  "acknowledgements",
  "call_sheet_issues",
  "pianist_sessions",
  "room_bookings",
  "called",
  "blocks",
  "calls",
  "conflicts",
  "choices",
  "callback_invitations",
  "callback_marks",
  "callback_rounds",
  "attendances",
  "day_links",
  "slot_assignments",
  "slots",
  "audition_rooms",
  "audition_days",
  "sign_ups",
  "ranges",
  "vocal_lines",
  "roles",
  "numbers",
  "score_parts",
  "scores",
  "files",
  "invitations",
  "positions",
  "travel_times",
  "rooms",
  "venues",
  "people",
  "productions",
  "seasons",
  "outbox",
  "audit_events",
  "companies",
  "api_tokens",
  "password_hashes",
  "sessions",
  "accounts",
  "verification_tokens",
  "rate_counters",
  "users",
];

/** Empties every table of the test database; refuses any other. */
export async function emptyDatabase(): Promise<void> {
  const name = new URL(env().DATABASE_URL).pathname.slice(1);
  if (!/test/.test(name)) throw new Error(`${name} is not a test database: it is left alone.`);
  await db.transaction(async (tx) => {
    await tx.execute(sql`set foreign_key_checks = 0`);
    for (const table of TABLES) await tx.execute(sql.raw(`delete from \`${table}\``));
    await tx.execute(sql`set foreign_key_checks = 1`);
  });
}

/** A login with a company's record and (if told) an open position. */
export async function makePerson(
  companyId: string,
  name: string,
  position?: { kind: PositionKind; productionId?: string | null },
): Promise<TestPerson> {
  const email = `${name.toLowerCase().replace(/[^a-z]+/g, ".")}.${newId().slice(-6)}@people.example`;
  const userId = newId();
  const personId = newId();
  await db.insert(t.users).values({ id: userId, name, email });
  await db.insert(t.people).values({ id: personId, companyId, userId, name, email });
  if (position) {
    await db.insert(t.positions).values({
      companyId,
      personId,
      kind: position.kind,
      productionId: position.productionId ?? null,
    });
  }
  return { userId, personId, email, name };
}

/**
 * Two companies that must never see each other. In the first, a production with one person in every position and another
 * production with its own MD; in the second a whole other production.
 */
export async function makeWorld() {
  await emptyDatabase();
  const companyId = newId();
  const otherCompanyId = newId();
  await db.insert(t.companies).values([
    { id: companyId, name: "Lantern Street Theatre", zone: "Europe/London" },
    { id: otherCompanyId, name: "Fenmoor Conservatory", zone: "Europe/London" },
  ]);
  const productionId = newId();
  const siblingProductionId = newId();
  const otherProductionId = newId();
  await db.insert(t.productions).values([
    { id: productionId, companyId, title: "The Tidewatcher", stage: "auditions" },
    { id: siblingProductionId, companyId, title: "Marrow Street", stage: "rehearsals" },
    {
      id: otherProductionId,
      companyId: otherCompanyId,
      title: "A Fair at Candlemas",
      stage: "auditions",
    },
  ]);
  const venueId = newId();
  const roomId = newId();
  const secondRoomId = newId();
  const otherVenueId = newId();
  const otherRoomId = newId();
  await db.insert(t.venues).values([
    { id: venueId, companyId, name: "Lantern Street", address: "4 Quay Lane" },
    { id: otherVenueId, companyId: otherCompanyId, name: "Fenmoor Hall" },
  ]);
  await db.insert(t.rooms).values([
    { id: roomId, companyId, venueId, name: "Room 1" },
    { id: secondRoomId, companyId, venueId, name: "Room 2" },
    { id: otherRoomId, companyId: otherCompanyId, venueId: otherVenueId, name: "Hall" },
  ]);
  const inProduction = (kind: PositionKind, name: string) =>
    makePerson(companyId, name, { kind, productionId });
  const people = {
    md: await inProduction("music_director", "Runa Oake"),
    assistant: await inProduction("assistant_md", "Ilse Varga"),
    stageManager: await inProduction("stage_manager", "Bram Teller"),
    director: await inProduction("director", "Odile Marsh"),
    choreographer: await inProduction("choreographer", "Tomas Rill"),
    producer: await inProduction("producer", "Greta Hollis"),
    accompanist: await inProduction("accompanist", "Hanne Briscoe"),
    actor: await inProduction("actor", "Wren Tallis"),
    otherActor: await inProduction("actor", "Dele Fashanu"),
    admin: await makePerson(companyId, "Cora Finch", { kind: "company_admin" }),
    siblingMd: await makePerson(companyId, "Petra Lund", {
      kind: "music_director",
      productionId: siblingProductionId,
    }),
    outsiderMd: await makePerson(otherCompanyId, "Lucan Wray", {
      kind: "music_director",
      productionId: otherProductionId,
    }),
    outsiderAdmin: await makePerson(otherCompanyId, "Maud Ferris", { kind: "company_admin" }),
  };
  const strangerId = newId();
  await db.insert(t.users).values({
    id: strangerId,
    name: "Nobody Known",
    email: `stranger.${strangerId.slice(-6)}@people.example`,
  });
  return {
    companyId,
    otherCompanyId,
    productionId,
    siblingProductionId,
    otherProductionId,
    venueId,
    roomId,
    secondRoomId,
    otherVenueId,
    otherRoomId,
    people,
    strangerId,
  };
}
