import { beforeAll, describe, expect, test } from "vitest";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import * as t from "@/db/schema";
import { duplicateKey } from "@/lib/data/transaction";
import { auditionRoom, makeDay, makeSignUps, slotIds } from "../helpers/audition-day";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

// Written past our own functions: what the database itself must refuse.
let world: World;
let dayId: string;
beforeAll(async () => {
  world = await makeWorld();
  dayId = await makeDay(world, "2027-03-20");
});

async function keyOf(work: Promise<unknown>): Promise<string | null> {
  try {
    await work;
    return null;
  } catch (error) {
    return duplicateKey(error);
  }
}

describe("the database refuses", () => {
  test("two singers in one slot, also of twenty at once", async () => {
    const [slotId] = await slotIds(dayId);
    const singers = await makeSignUps(world, 20, "db");
    const keys = await Promise.all(
      singers.map((signUpId) =>
        keyOf(db.insert(t.slotAssignments).values({ slotId: slotId ?? "", signUpId, dayId })),
      ),
    );
    expect(keys.filter((key) => key === null)).toHaveLength(1);
    expect(keys.filter((key) => key === "PRIMARY")).toHaveLength(19);
  });

  test("one singer in two slots of a day", async () => {
    const [, second, third] = await slotIds(dayId);
    const [signUpId] = await makeSignUps(world, 1, "dbtwo");
    expect(
      await keyOf(
        db
          .insert(t.slotAssignments)
          .values({ slotId: second ?? "", signUpId: signUpId ?? "", dayId }),
      ),
    ).toBeNull();
    expect(
      await keyOf(
        db
          .insert(t.slotAssignments)
          .values({ slotId: third ?? "", signUpId: signUpId ?? "", dayId }),
      ),
    ).toBe("slot_assignments_day");
  });

  test("one person signed up twice to a production", async () => {
    const row = () => ({
      id: newId(),
      productionId: world.productionId,
      personId: world.people.actor.personId,
      place: 900,
    });
    expect(await keyOf(db.insert(t.signUps).values(row()))).toBeNull();
    expect(await keyOf(db.insert(t.signUps).values(row()))).toBe("sign_ups_once");
  });

  test("a room held twice at once, a pianist taken twice at once, slots over one another; side by side is fine", async () => {
    const room = await auditionRoom(dayId, world.roomId);
    const other = await makeDay(world, "2027-03-27", [world.roomId]);
    const otherRoom = await auditionRoom(other, world.roomId);
    const at = (time: string) => new Date(`2027-03-20T${time}:00Z`);
    await db.delete(t.roomBookings);
    const book = (auditionRoomId: string, from: string, to: string) =>
      db
        .insert(t.roomBookings)
        .values({ roomId: world.roomId, startsAt: at(from), endsAt: at(to), auditionRoomId });
    expect(await keyOf(book(room, "10:00", "12:00"))).toBeNull();
    expect(await keyOf(book(otherRoom, "11:59", "13:00"))).toBe("room_bookings_held");
    expect(await keyOf(book(otherRoom, "12:00", "13:00"))).toBeNull();

    const pianist = world.people.accompanist;
    const play = (auditionRoomId: string, from: string, to: string) =>
      db.insert(t.pianistSessions).values({
        productionId: world.productionId,
        personId: pianist.personId,
        bookeeId: pianist.userId,
        auditionRoomId,
        startsAt: at(from),
        endsAt: at(to),
      });
    expect(await keyOf(play(room, "10:00", "12:00"))).toBeNull();
    expect(await keyOf(play(otherRoom, "09:00", "10:01"))).toBe("pianist_sessions_held");
    expect(await keyOf(play(otherRoom, "12:00", "12:30"))).toBeNull();

    expect(
      await keyOf(
        db.insert(t.slots).values({
          auditionRoomId: room,
          kind: "slot",
          startsAt: at("10:04"),
          endsAt: at("10:06"),
        }),
      ),
    ).toBe("slots_held");
  });
});
