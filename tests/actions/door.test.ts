import { eq } from "drizzle-orm";
import { afterAll, beforeAll, beforeEach, describe, expect, test, vi } from "vitest";
import { actAtDoor as actNow } from "@/app/(room)/door/[token]/actions";
import {
  makeDoorLink,
  placeSinger,
  removeDay,
  revokeDoorLink,
} from "@/app/(season)/productions/[productionId]/auditions/actions";
import { db } from "@/db/client";
import * as t from "@/db/schema";
import { actAtDoor, readDoor } from "@/lib/data/auditions/door";
import { as } from "../helpers/as";
import { makeDay, makeSignUps, slotIds } from "../helpers/audition-day";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
let dayId: string;
let singers: string[];
const SOURCE = "198.51.100.7";
/** 20 March 2027, 12:27 in London, which keeps UTC then. */
const NOON = new Date("2027-03-20T12:27:00Z");

beforeAll(async () => {
  // The days below lie ahead, whenever the tests run: only the date stands still, timers go on.
  vi.useFakeTimers({ toFake: ["Date"], now: new Date("2027-03-01T12:00:00Z") });
  world = await makeWorld();
  dayId = await makeDay(world, "2027-03-20");
  singers = await makeSignUps(world, 4, "door", {
    song: "The Lost Chord",
    phone: "0000 555 011",
    low: 57,
    high: 76,
  });
  const slots = await slotIds(dayId);
  // Every second slot is Room 1's.
  for (const [index, signUpId] of singers.entries()) {
    await placeSinger({
      productionId: world.productionId,
      signUpId,
      slotId: slots[index * 2] ?? "",
      seenIn: null,
    });
  }
});
afterAll(() => {
  vi.useRealTimers();
});

const singer = (index: number): string => singers[index] ?? "";
const tokenOf = (link: string): string => link.split("/door/")[1] ?? "";

async function link(): Promise<string> {
  as(world.people.stageManager.userId);
  const made = await makeDoorLink({ productionId: world.productionId, dayId });
  if (!made.ok) throw new Error(made.error.message);
  return tokenOf(made.data.link);
}

describe("the monitor's link", () => {
  test("is made and ended by whoever may run the door; only its hash is kept", async () => {
    const p = world.people;
    const which = { productionId: world.productionId, dayId };
    for (const person of [p.director, p.producer, p.accompanist, p.actor, p.admin]) {
      as(person.userId);
      expect(await makeDoorLink(which), person.name).toMatchObject({
        ok: false,
        error: { code: "not-allowed" },
      });
      expect(await revokeDoorLink(which), person.name).toMatchObject({
        ok: false,
        error: { code: "not-allowed" },
      });
    }
    as(p.outsiderMd.userId);
    expect(await makeDoorLink(which)).toMatchObject({ ok: false, error: { code: "not-found" } });
    const first = await link();
    const second = await link();
    const kept = await db.select().from(t.dayLinks).where(eq(t.dayLinks.dayId, dayId));
    expect(JSON.stringify(kept)).not.toContain(second);
    await expect(readDoor(first, SOURCE, NOON)).rejects.toMatchObject({ code: "not-found" });
    expect(await readDoor(second, SOURCE, NOON)).toMatchObject({ open: true });
    await revokeDoorLink(which);
    await expect(readDoor(second, SOURCE, NOON)).rejects.toMatchObject({ code: "not-found" });
  });

  test("opens on its own local day only, and says so in plain words on others", async () => {
    const token = await link();
    expect(await readDoor(token, SOURCE, new Date("2027-03-19T23:59:59Z"))).toEqual({
      open: false,
      notice: "This link opens on Saturday 20 March, at midnight in London. Come back on the day.",
    });
    expect(await readDoor(token, SOURCE, new Date("2027-03-20T00:00:00Z"))).toMatchObject({
      open: true,
    });
    expect(await readDoor(token, SOURCE, new Date("2027-03-20T23:59:59Z"))).toMatchObject({
      open: true,
    });
    expect(await readDoor(token, SOURCE, new Date("2027-03-21T00:00:00Z"))).toEqual({
      open: false,
      notice:
        "This link was for Saturday 20 March, which is over. Ask the stage manager for the next day's link.",
    });
    // The action has the server's clock, on which it is 1 March.
    expect(await actNow({ token, signUpId: singer(0), act: "here" })).toMatchObject({
      ok: false,
      error: { code: "refused" },
    });
  });

  test("shows name, time and state, and no other thing about anyone", async () => {
    const token = await link();
    const view = await readDoor(token, SOURCE, NOON);
    if (!view.open) throw new Error("closed");
    expect(Object.keys(view).sort()).toEqual([
      "day",
      "now",
      "open",
      "rooms",
      "slotMinutes",
      "zone",
    ]);
    const items = view.rooms.flatMap((room) => room.items);
    expect(items.filter((item) => item.kind === "singer")).toHaveLength(4);
    expect(items.filter((item) => item.kind === "lunch")).toHaveLength(2);
    for (const room of view.rooms)
      expect(Object.keys(room).sort()).toEqual(["id", "items", "name"]);
    for (const item of items) {
      expect(Object.keys(item).sort()).toEqual([
        "endsAt",
        "id",
        "inAt",
        "kind",
        "name",
        "signUpId",
        "startsAt",
        "state",
      ]);
    }
    const told = JSON.stringify(view);
    for (const secret of ["@singers.example", "0000 555", "Lost Chord"])
      expect(told).not.toContain(secret);
  });
});

describe("at the door", () => {
  let token: string;
  beforeEach(async () => {
    token = await link();
    await db.delete(t.attendances);
  });
  const act = (index: number, what: "here" | "not-here" | "in" | "out", minute = 0) =>
    actAtDoor(
      { token, signUpId: singer(index), act: what },
      SOURCE,
      new Date(NOON.getTime() + minute * 60_000),
    );
  const states = async () => {
    const view = await readDoor(token, SOURCE, NOON);
    if (!view.open) throw new Error("closed");
    return view.rooms
      .flatMap((room) => room.items)
      .flatMap((item) => (item.kind === "singer" ? [item.state] : []));
  };

  test("here, sent in, out; sending the next in shows the one before out", async () => {
    await act(0, "here");
    expect(await states()).toEqual(["here", "not here yet", "not here yet", "not here yet"]);
    await act(0, "in", 1);
    await act(1, "in", 9);
    expect(await states()).toEqual(["heard", "inside", "not here yet", "not here yet"]);
    await act(1, "out", 17);
    expect(await states()).toEqual(["heard", "heard", "not here yet", "not here yet"]);
    const [trail] = await db
      .select()
      .from(t.auditEvents)
      .where(eq(t.auditEvents.action, "door.out"));
    expect(trail).toMatchObject({ actorName: "At the door", userId: null });
  });

  test("here can be taken back, out of order is refused with what to do", async () => {
    await act(2, "here");
    await act(2, "not-here");
    expect(await states()).toEqual([
      "not here yet",
      "not here yet",
      "not here yet",
      "not here yet",
    ]);
    await expect(act(2, "out")).rejects.toMatchObject({
      code: "refused",
      message: expect.stringContaining("Send in") as string,
    });
    await act(2, "in");
    await expect(act(2, "not-here")).rejects.toMatchObject({ code: "refused" });
  });

  test("two phones sending two singers in at once leave one inside", async () => {
    await Promise.all([act(0, "in"), act(1, "in"), act(2, "in"), act(3, "in")]);
    expect((await states()).filter((state) => state === "inside")).toHaveLength(1);
  });

  test("a singer of another day, a wrong token and a removed day open nothing", async () => {
    await expect(
      actAtDoor({ token, signUpId: world.productionId, act: "here" }, SOURCE, NOON),
    ).rejects.toMatchObject({ code: "not-found" });
    await expect(
      actAtDoor({ token: "wrong", signUpId: singer(0), act: "here" }, SOURCE, NOON),
    ).rejects.toMatchObject({ code: "not-found" });
    as(world.people.md.userId);
    const other = await makeDay(world, "2027-06-01", [world.roomId]);
    const made = await makeDoorLink({ productionId: world.productionId, dayId: other });
    if (!made.ok) throw new Error(made.error.message);
    await removeDay({ productionId: world.productionId, dayId: other });
    await expect(
      readDoor(tokenOf(made.data.link), SOURCE, new Date("2027-06-01T12:00:00Z")),
    ).rejects.toMatchObject({ code: "not-found" });
  });

  test("guessing is limited by source; the true link is not counted", async () => {
    const guesser = "203.0.113.9";
    const codes: string[] = [];
    for (let i = 0; i < 122; i += 1) {
      await readDoor(`guess-${String(i)}`, guesser, NOON).catch((error: unknown) => {
        codes.push((error as { code: string }).code);
      });
    }
    expect(new Set(codes)).toEqual(new Set(["not-found", "too-many"]));
    expect(codes.at(-1)).toBe("too-many");
    for (let i = 0; i < 130; i += 1) await readDoor(token, SOURCE, NOON);
  });
});
