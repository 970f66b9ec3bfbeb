import { eq } from "drizzle-orm";
import { beforeAll, describe, expect, test } from "vitest";
import {
  changeDay,
  createDay,
  placeSinger,
  removeDay,
} from "@/app/(season)/productions/[productionId]/auditions/actions";
import { db } from "@/db/client";
import * as t from "@/db/schema";
import { loadActor } from "@/lib/data/actor";
import { listDays } from "@/lib/data/auditions/days";
import { readDay } from "@/lib/data/auditions/day-view";
import { clock } from "@/lib/format-dates";
import { as } from "../helpers/as";
import { dayInput, makeDay, makeSignUps, slotIds, whereIs } from "../helpers/audition-day";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
beforeAll(async () => {
  world = await makeWorld();
});

async function actorOf(userId: string) {
  const actor = await loadActor(userId);
  if (!actor) throw new Error("no such login");
  return actor;
}

describe("an audition day", () => {
  test("is laid out with rests and lunch as worked out by hand", async () => {
    const dayId = await makeDay(world, "2027-03-20", [world.roomId]);
    const day = await readDay(await actorOf(world.people.md.userId), world.productionId, dayId);
    const items = day.rooms[0]?.items ?? [];
    const at = (iso: string) => clock(new Date(iso), day.zone);
    // By hand, from the rules alone: ten slots of 8 fill 80 minutes, 10:00–11:20; the pianist rests to 11:30; ten more to
    // 12:50, when the next rest falls due inside the lunch window (12:30–14:00) and becomes lunch, to 13:50; ten to 15:10,
    // rest to 15:20, five to 16:00.
    expect(
      items
        .filter((i) => i.kind !== "slot")
        .map((i) => `${i.kind} ${at(i.startsAt)}–${at(i.endsAt)}`),
    ).toEqual(["rest 11:20–11:30", "lunch 12:50–13:50", "rest 15:10–15:20"]);
    expect(items.filter((i) => i.kind === "slot")).toHaveLength(35);
    expect(at(items.at(-1)?.endsAt ?? "")).toBe("16:00");
    // 20 March 2027 lies before the British clocks change (28 March), so that local time is UTC.
    expect(items[0]?.startsAt).toBe("2027-03-20T10:00:00.000Z");
    as(world.people.md.userId);
    expect(await removeDay({ productionId: world.productionId, dayId })).toMatchObject({
      ok: true,
    });
  });

  test("books its rooms: a taken one is refused with who has it, when, and what to do", async () => {
    const dayId = await makeDay(world, "2027-03-21", [world.roomId]);
    as(world.people.siblingMd.userId);
    const clash = await createDay({
      ...dayInput(world, "2027-03-21", [world.secondRoomId, world.roomId]),
      productionId: world.siblingProductionId,
    });
    expect(clash).toMatchObject({
      ok: false,
      error: {
        code: "taken",
        message:
          "Room 1 is taken by the auditions of The Tidewatcher, 10:00–16:00. Choose another room, or times outside that.",
      },
    });
    expect(
      await listDays(await actorOf(world.people.siblingMd.userId), world.siblingProductionId),
    ).toEqual([]);
    as(world.people.md.userId);
    expect(await removeDay({ productionId: world.productionId, dayId })).toMatchObject({
      ok: true,
    });
    as(world.people.siblingMd.userId);
    const free = await createDay({
      ...dayInput(world, "2027-03-21", [world.roomId]),
      productionId: world.siblingProductionId,
    });
    expect(free).toMatchObject({ ok: true });
  });

  test("of ten made at once in one room, one stands", async () => {
    as(world.people.md.userId);
    const rooms = [world.roomId];
    const made = await Promise.all(
      Array.from({ length: 10 }, () => createDay(dayInput(world, "2027-03-22", rooms))),
    );
    expect(made.filter((result) => result.ok)).toHaveLength(1);
    expect(made.filter((result) => !result.ok && result.error.code === "taken")).toHaveLength(9);
  });

  test("names what stands in the way beside the field", async () => {
    as(world.people.md.userId);
    const base = dayInput(world, "2027-03-23");
    expect(await createDay({ ...base, rooms: [] })).toMatchObject({
      ok: false,
      error: { fields: { rooms: "Choose at least one room." } },
    });
    expect(
      await createDay({
        ...base,
        rooms: [{ roomId: world.roomId, opens: "16:00", closes: "10:00" }],
      }),
    ).toMatchObject({
      ok: false,
      error: { fields: { rooms: "The room closes before it opens. Change one of the times." } },
    });
    expect(await createDay({ ...base, lunchFrom: "" })).toMatchObject({
      ok: false,
      error: { code: "invalid" },
    });
    expect(
      await createDay({
        ...base,
        rooms: [{ roomId: world.otherRoomId, opens: "10:00", closes: "12:00" }],
      }),
    ).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
  });

  test("is planned by the music team and stage management only", async () => {
    const base = dayInput(world, "2027-03-24");
    const outcome = async (userId: string | null) => {
      as(userId);
      const result = await createDay(base);
      if (!result.ok) return result.error.code;
      await removeDay({ productionId: world.productionId, dayId: result.data.dayId });
      return "ok";
    };
    const p = world.people;
    expect(await outcome(p.assistant.userId)).toBe("ok");
    expect(await outcome(p.stageManager.userId)).toBe("ok");
    for (const person of [
      p.director,
      p.choreographer,
      p.producer,
      p.accompanist,
      p.actor,
      p.admin,
    ]) {
      expect(await outcome(person.userId), person.name).toBe("not-allowed");
    }
    for (const userId of [
      p.siblingMd.userId,
      p.outsiderMd.userId,
      p.outsiderAdmin.userId,
      world.strangerId,
    ]) {
      expect(await outcome(userId)).toBe("not-found");
    }
    expect(await outcome(null)).toBe("signed-out");
  });
});

describe("changing a day", () => {
  test("keeps whoever's time still exists, and asks once before others lose theirs", async () => {
    const dayId = await makeDay(world, "2027-04-03", [world.roomId]);
    const [early, late] = await makeSignUps(world, 2, "change");
    const slots = await slotIds(dayId);
    if (!early || !late) throw new Error("no sign-ups");
    await placeSinger({
      productionId: world.productionId,
      signUpId: early,
      slotId: slots[0] ?? "",
      seenIn: null,
    });
    await placeSinger({
      productionId: world.productionId,
      signUpId: late,
      slotId: slots.at(-1) ?? "",
      seenIn: null,
    });

    const change = {
      ...dayInput(world, "2027-04-03", [world.roomId]),
      dayId,
      version: 1,
      rooms: [{ roomId: world.roomId, opens: "10:00", closes: "15:30" }],
    };
    const asked = await changeDay(change);
    expect(asked).toMatchObject({
      ok: true,
      data: { saved: false, lost: [{ signUpId: late, time: "15:52", room: "Room 1" }] },
    });
    expect((await whereIs(late)).slotId).not.toBeNull();

    const agreed = await changeDay({ ...change, mayLose: [late] });
    expect(agreed).toMatchObject({ ok: true, data: { saved: true } });
    expect(await whereIs(late)).toEqual({ state: "listed", slotId: null });
    expect((await whereIs(early)).slotId).toBe((await slotIds(dayId))[0]);
    const [booking] = await db
      .select()
      .from(t.roomBookings)
      .innerJoin(t.auditionRooms, eq(t.auditionRooms.id, t.roomBookings.auditionRoomId))
      .where(eq(t.auditionRooms.dayId, dayId));
    // 3 April 2027: British summer time, one hour ahead of UTC.
    expect(booking?.room_bookings.endsAt.toISOString()).toBe("2027-04-03T14:30:00.000Z");

    expect(await changeDay(change)).toMatchObject({ ok: false, error: { code: "stale" } });
  });

  test("a day of another production is not there", async () => {
    const dayId = await makeDay(world, "2027-04-04", [world.secondRoomId]);
    as(world.people.siblingMd.userId);
    const change = {
      ...dayInput(world, "2027-04-04"),
      productionId: world.siblingProductionId,
      dayId,
      version: 1,
    };
    expect(await changeDay(change)).toMatchObject({ ok: false, error: { code: "not-found" } });
    expect(await removeDay({ productionId: world.siblingProductionId, dayId })).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
    as(world.people.actor.userId);
    expect(await removeDay({ productionId: world.productionId, dayId })).toMatchObject({
      ok: false,
      error: { code: "not-allowed" },
    });
  });
});
