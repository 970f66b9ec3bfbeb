import { asc, eq, inArray } from "drizzle-orm";
import {
  createDay,
  importSingers,
} from "@/app/(season)/productions/[productionId]/auditions/actions";
import { db } from "@/db/client";
import * as t from "@/db/schema";
import { as } from "./as";
import type { World } from "./world";

/** A plan as the form sends it: 10:00 to 16:00, 8 minutes, a rest of 10 after 80, lunch of 60 between 12:30 and 14:00. */
export function dayInput(
  world: World,
  localDate = "2027-03-20",
  rooms = [world.roomId, world.secondRoomId],
) {
  return {
    productionId: world.productionId,
    localDate,
    slotMinutes: "8",
    restAfterMinutes: "80",
    restMinutes: "10",
    lunchMinutes: "60",
    lunchFrom: "12:30",
    lunchTo: "14:00",
    hold: false,
    rooms: rooms.map((roomId) => ({ roomId, opens: "10:00", closes: "16:00" })),
  };
}

/** Makes a day as the music director; throws when refused. */
export async function makeDay(world: World, localDate?: string, rooms?: string[]): Promise<string> {
  as(world.people.md.userId);
  const made = await createDay(dayInput(world, localDate, rooms));
  if (!made.ok) throw new Error(made.error.message);
  return made.data.dayId;
}

/** Signs up this many invented singers as the music director; returns their sign-ups' ids in order. */
export async function makeSignUps(
  world: World,
  count: number,
  tag: string,
  extra: object = {},
): Promise<string[]> {
  as(world.people.md.userId);
  const emails = Array.from({ length: count }, (_, i) => `${tag}.${String(i)}@singers.example`);
  const done = await importSingers({
    productionId: world.productionId,
    rows: emails.map((email, i) => ({ name: `Singer ${tag} ${String(i)}`, email, ...extra })),
  });
  if (!done.ok) throw new Error(done.error.message);
  const rows = await db
    .select({ id: t.signUps.id })
    .from(t.signUps)
    .innerJoin(t.people, eq(t.people.id, t.signUps.personId))
    .where(inArray(t.people.email, emails))
    .orderBy(asc(t.signUps.place));
  return rows.map((row) => row.id);
}

/** The ids of the day's slots in order of time, then room name. */
export async function slotIds(dayId: string): Promise<string[]> {
  const rows = await db
    .select({ id: t.slots.id })
    .from(t.slots)
    .innerJoin(t.auditionRooms, eq(t.auditionRooms.id, t.slots.auditionRoomId))
    .innerJoin(t.rooms, eq(t.rooms.id, t.auditionRooms.roomId))
    .where(inArray(t.slots.kind, ["slot"]))
    .orderBy(asc(t.slots.startsAt), asc(t.rooms.name));
  const ofDay = await db
    .select({ id: t.slots.id })
    .from(t.slots)
    .innerJoin(t.auditionRooms, eq(t.auditionRooms.id, t.slots.auditionRoomId))
    .where(eq(t.auditionRooms.dayId, dayId));
  const ids = new Set(ofDay.map((row) => row.id));
  return rows.map((row) => row.id).filter((id) => ids.has(id));
}

/** The audition room's id of a company room on the day. */
export async function auditionRoom(dayId: string, roomId: string): Promise<string> {
  const rows = await db.select().from(t.auditionRooms).where(eq(t.auditionRooms.dayId, dayId));
  const room = rows.find((row) => row.roomId === roomId);
  if (!room) throw new Error("no such room on the day");
  return room.id;
}

/** The state of a sign-up and the slot it is in. */
export async function whereIs(signUpId: string): Promise<{ state: string; slotId: string | null }> {
  const [row] = await db
    .select({ state: t.signUps.state, slotId: t.slotAssignments.slotId })
    .from(t.signUps)
    .leftJoin(t.slotAssignments, eq(t.slotAssignments.signUpId, t.signUps.id))
    .where(eq(t.signUps.id, signUpId));
  if (!row) throw new Error("no such sign-up");
  return row;
}
