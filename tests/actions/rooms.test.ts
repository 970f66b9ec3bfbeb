import { eq } from "drizzle-orm";
import { beforeEach, describe, expect, test } from "vitest";
import {
  addRoom,
  addVenue,
  changeRoom,
  changeVenue,
  setTravel,
} from "@/app/(season)/companies/[companyId]/actions";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import { travelTimes, venues } from "@/db/schema";
import { loadActor } from "@/lib/data/actor";
import { readRooms } from "@/lib/data/rooms";
import { as } from "../helpers/as";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
beforeEach(async () => {
  world = await makeWorld();
});

async function roomsSeenBy(userId: string) {
  const actor = await loadActor(userId);
  if (!actor) throw new Error("no such login");
  return readRooms(actor, world.companyId);
}

describe("venues and rooms", () => {
  test.each(["admin", "stageManager", "md", "siblingMd"] as const)(
    "the %s adds and renames them",
    async (who) => {
      as(world.people[who].userId);
      const venue = await addVenue({
        companyId: world.companyId,
        name: "Ropewalk Hall",
        address: "",
      });
      expect(venue).toMatchObject({ ok: true });
      if (!venue.ok) return;
      const { venueId } = venue.data;
      const room = await addRoom({
        companyId: world.companyId,
        venueId,
        name: "Loft",
        hasPiano: false,
      });
      expect(room).toMatchObject({ ok: true });
      if (!room.ok) return;
      await changeVenue({
        companyId: world.companyId,
        venueId,
        name: "Ropewalk",
        address: "1 Ropewalk",
      });
      await changeRoom({
        companyId: world.companyId,
        roomId: room.data.roomId,
        name: "Upper loft",
        hasPiano: true,
      });
      const { venues: listed } = await roomsSeenBy(world.people[who].userId);
      expect(listed.find((v) => v.id === venueId)).toEqual({
        id: venueId,
        name: "Ropewalk",
        address: "1 Ropewalk",
        rooms: [{ id: room.data.roomId, name: "Upper loft", hasPiano: true }],
      });
    },
  );

  test.each([
    ["assistant", "not-allowed"],
    ["director", "not-allowed"],
    ["accompanist", "not-allowed"],
    ["actor", "not-allowed"],
    ["outsiderAdmin", "not-found"],
  ] as const)("the %s neither changes nor opens them: %s", async (who, code) => {
    const { userId } = world.people[who];
    as(userId);
    const refused = { ok: false, error: { code } };
    const { companyId, venueId, roomId } = world;
    expect(await addVenue({ companyId, name: "X", address: "" })).toMatchObject(refused);
    expect(await changeVenue({ companyId, venueId, name: "X", address: "" })).toMatchObject(
      refused,
    );
    expect(await addRoom({ companyId, venueId, name: "X", hasPiano: true })).toMatchObject(refused);
    expect(await changeRoom({ companyId, roomId, name: "X", hasPiano: true })).toMatchObject(
      refused,
    );
    expect(await setTravel({ companyId, pairs: [] })).toMatchObject(refused);
    await expect(roomsSeenBy(userId)).rejects.toMatchObject({ code });
  });

  test("a name twice is refused beside its field", async () => {
    as(world.people.admin.userId);
    const { companyId, venueId, secondRoomId } = world;
    expect(await addVenue({ companyId, name: "lantern street", address: "" })).toMatchObject({
      ok: false,
      error: { code: "invalid", fields: { name: expect.any(String) as string } },
    });
    expect(
      await changeRoom({ companyId, roomId: secondRoomId, name: "Room 1", hasPiano: true }),
    ).toMatchObject({ ok: false, error: { fields: { name: expect.any(String) as string } } });
    expect(await addRoom({ companyId, venueId, name: "Room 2", hasPiano: true })).toMatchObject({
      ok: false,
      error: { fields: { name: expect.any(String) as string } },
    });
  });

  test("another company's venue or room is not there, with one's own company named", async () => {
    as(world.people.admin.userId);
    const { companyId, otherVenueId, otherRoomId } = world;
    const missing = { ok: false, error: { code: "not-found" } };
    expect(
      await addRoom({ companyId, venueId: otherVenueId, name: "X", hasPiano: true }),
    ).toMatchObject(missing);
    expect(
      await changeVenue({ companyId, venueId: otherVenueId, name: "X", address: "" }),
    ).toMatchObject(missing);
    expect(
      await changeRoom({ companyId, roomId: otherRoomId, name: "X", hasPiano: true }),
    ).toMatchObject(missing);
    const [theirs] = await db.select().from(venues).where(eq(venues.id, otherVenueId));
    expect(theirs?.name).toBe("Fenmoor Hall");
  });
});

describe("ways between venues", () => {
  async function twoVenues(): Promise<[string, string]> {
    const id = newId();
    await db.insert(venues).values({ id, companyId: world.companyId, name: "Ropewalk Hall" });
    return world.venueId < id ? [world.venueId, id] : [id, world.venueId];
  }

  test("are kept once, the smaller id first, whichever was named first", async () => {
    const [a, b] = await twoVenues();
    as(world.people.stageManager.userId);
    const { companyId } = world;
    await setTravel({ companyId, pairs: [{ a: b, b: a, minutes: "35" }] });
    await setTravel({ companyId, pairs: [{ a, b, minutes: "40" }] });
    expect(await db.select().from(travelTimes)).toEqual([{ venueA: a, venueB: b, minutes: 40 }]);
    await setTravel({ companyId, pairs: [{ a: b, b: a, minutes: "" }] });
    expect(await db.select().from(travelTimes)).toEqual([]);
  });

  test("of one pair named twice the last counts", async () => {
    const [a, b] = await twoVenues();
    as(world.people.admin.userId);
    const pairs = [
      { a, b, minutes: "10" },
      { a: b, b: a, minutes: "20" },
    ];
    expect(await setTravel({ companyId: world.companyId, pairs })).toMatchObject({ ok: true });
    expect(await db.select().from(travelTimes)).toEqual([{ venueA: a, venueB: b, minutes: 20 }]);
  });

  test("to another company's venue are refused, and the rest with them", async () => {
    const [a, b] = await twoVenues();
    as(world.people.admin.userId);
    const pairs = [
      { a, b, minutes: "10" },
      { a, b: world.otherVenueId, minutes: "20" },
    ];
    expect(await setTravel({ companyId: world.companyId, pairs })).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
    expect(await db.select().from(travelTimes)).toEqual([]);
  });

  test.each(["-5", "1441", "half an hour", "1.5"])("%s minutes are refused", async (minutes) => {
    const [a, b] = await twoVenues();
    as(world.people.admin.userId);
    expect(
      await setTravel({ companyId: world.companyId, pairs: [{ a, b, minutes }] }),
    ).toMatchObject({ ok: false, error: { code: "invalid" } });
  });

  test("to the venue itself is no way", async () => {
    as(world.people.admin.userId);
    const { companyId, venueId } = world;
    expect(
      await setTravel({ companyId, pairs: [{ a: venueId, b: venueId, minutes: "5" }] }),
    ).toMatchObject({ ok: false, error: { code: "invalid" } });
  });
});
