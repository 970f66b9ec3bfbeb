import { and, eq, like } from "drizzle-orm";
import { afterAll, beforeAll, beforeEach, describe, expect, test, vi } from "vitest";
import {
  acceptFill,
  inviteSingers,
  placeSinger,
  previewInvitations,
  proposeFill,
  swapSingers,
  takeOut,
} from "@/app/(season)/productions/[productionId]/auditions/actions";
import { db } from "@/db/client";
import * as t from "@/db/schema";
import { loadActor } from "@/lib/data/actor";
import { readDay } from "@/lib/data/auditions/day-view";
import { answerSlot, listOwnSlots } from "@/lib/data/auditions/own";
import { as } from "../helpers/as";
import { makeDay, makeSignUps, slotIds, whereIs } from "../helpers/audition-day";
import { makePerson, makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
let dayId: string;
let slots: string[];
let productionId: string;
beforeAll(async () => {
  // The days below lie ahead, whenever the tests run: only the date stands still, timers go on.
  vi.useFakeTimers({ toFake: ["Date"], now: new Date("2027-03-01T12:00:00Z") });
  world = await makeWorld();
  productionId = world.productionId;
  dayId = await makeDay(world, "2027-03-20");
  slots = await slotIds(dayId);
});
afterAll(() => {
  vi.useRealTimers();
});
beforeEach(() => {
  as(world.people.md.userId);
});

const slot = (index: number): string => slots[index] ?? "";
const one = async (tag: string, extra: object = {}): Promise<string> =>
  (await makeSignUps(world, 1, tag, extra))[0] ?? "";
const mails = (template: string) =>
  db
    .select()
    .from(t.outbox)
    .where(and(eq(t.outbox.template, template), like(t.outbox.toEmail, "%@singers.example")));

async function actorOf(userId: string) {
  const actor = await loadActor(userId);
  if (!actor) throw new Error("no such login");
  return actor;
}

describe("placing", () => {
  test("of twenty singers put into one slot at once, one is in it", async () => {
    const singers = await makeSignUps(world, 20, "race");
    const results = await Promise.all(
      singers.map((signUpId) =>
        placeSinger({ productionId, signUpId, slotId: slot(0), seenIn: null }),
      ),
    );
    expect(results.filter((r) => r.ok)).toHaveLength(1);
    expect(new Set(results.flatMap((r) => (r.ok ? [] : [r.error.code])))).toEqual(
      new Set(["taken"]),
    );
    const inIt = await db
      .select()
      .from(t.slotAssignments)
      .where(eq(t.slotAssignments.slotId, slot(0)));
    expect(inIt).toHaveLength(1);
    const [winner] = inIt;
    await takeOut({ productionId, signUpId: winner?.signUpId ?? "" });
  });

  test("of one singer put into twenty slots at once, one holds", async () => {
    const signUpId = await one("many");
    const results = await Promise.all(
      slots
        .slice(0, 20)
        .map((slotId) => placeSinger({ productionId, signUpId, slotId, seenIn: null })),
    );
    expect(results.filter((r) => r.ok)).toHaveLength(1);
    const held = await db
      .select()
      .from(t.slotAssignments)
      .where(eq(t.slotAssignments.signUpId, signUpId));
    expect(held).toHaveLength(1);
    await takeOut({ productionId, signUpId });
  });

  test("a taken slot says who sings there; a singer moved meanwhile is not moved again", async () => {
    const [a, b] = await makeSignUps(world, 2, "pair");
    if (!a || !b) throw new Error("no sign-ups");
    expect(
      await placeSinger({ productionId, signUpId: a, slotId: slot(2), seenIn: null }),
    ).toMatchObject({ ok: true });
    expect(
      await placeSinger({ productionId, signUpId: b, slotId: slot(2), seenIn: null }),
    ).toMatchObject({
      ok: false,
      error: {
        code: "taken",
        message: "Singer pair 0 sings at 10:08 in Room 1. Choose a free slot, or swap the two.",
      },
    });
    expect(
      await placeSinger({ productionId, signUpId: a, slotId: slot(4), seenIn: null }),
    ).toMatchObject({ ok: false, error: { code: "stale" } });
    expect(
      await placeSinger({ productionId, signUpId: a, slotId: slot(4), seenIn: slot(2) }),
    ).toMatchObject({ ok: true });
    expect((await whereIs(a)).slotId).toBe(slot(4));
  });

  test("two singers swap; on stale ground they do not", async () => {
    const [a, b] = await makeSignUps(world, 2, "swap");
    if (!a || !b) throw new Error("no sign-ups");
    await placeSinger({ productionId, signUpId: a, slotId: slot(10), seenIn: null });
    await placeSinger({ productionId, signUpId: b, slotId: slot(11), seenIn: null });
    const swap = {
      productionId,
      first: { signUpId: a, slotId: slot(10) },
      second: { signUpId: b, slotId: slot(11) },
    };
    expect(await swapSingers(swap)).toMatchObject({ ok: true });
    expect([(await whereIs(a)).slotId, (await whereIs(b)).slotId]).toEqual([slot(11), slot(10)]);
    expect(await swapSingers(swap)).toMatchObject({ ok: false, error: { code: "stale" } });
  });

  test("nobody sings in a rest, and no other production's slot is there", async () => {
    const signUpId = await one("rest");
    const day = await readDay(await actorOf(world.people.md.userId), productionId, dayId);
    const lunch = day.rooms[0]?.items.find((item) => item.kind === "lunch");
    expect(
      await placeSinger({ productionId, signUpId, slotId: lunch?.id ?? "", seenIn: null }),
    ).toMatchObject({ ok: false, error: { code: "refused" } });
    as(world.people.siblingMd.userId);
    expect(
      await placeSinger({
        productionId: world.siblingProductionId,
        signUpId,
        slotId: slot(20),
        seenIn: null,
      }),
    ).toMatchObject({ ok: false, error: { code: "not-found" } });
    expect(
      await placeSinger({ productionId, signUpId, slotId: slot(20), seenIn: null }),
    ).toMatchObject({ ok: false, error: { code: "not-found" } });
    as(world.people.director.userId);
    expect(
      await placeSinger({ productionId, signUpId, slotId: slot(20), seenIn: null }),
    ).toMatchObject({ ok: false, error: { code: "not-allowed" } });
  });
});

describe("inviting", () => {
  test("previews, invites those placed, and nobody twice", async () => {
    const [a, b] = await makeSignUps(world, 2, "invite");
    if (!a || !b) throw new Error("no sign-ups");
    await placeSinger({ productionId, signUpId: a, slotId: slot(20), seenIn: null });
    await placeSinger({ productionId, signUpId: b, slotId: slot(21), seenIn: null });
    const which = { productionId, dayId, signUpIds: [a, b] };
    const preview = await previewInvitations(which);
    // Two rooms side by side: the slots 20 and 21 are the eleventh of each, after the rest of 11:20 to 11:30.
    expect(preview).toMatchObject({
      ok: true,
      data: {
        recipients: [{ signUpId: a, when: "Saturday 20 March, 11:30" }, { signUpId: b }],
        message: { subject: "Your audition for The Tidewatcher: Saturday 20 March, 11:30" },
      },
    });
    expect(await mails("audition-invitation")).toHaveLength(0);
    const results = await Promise.all([
      inviteSingers(which),
      inviteSingers(which),
      inviteSingers(which),
    ]);
    expect(results.map((r) => (r.ok ? r.data.invited : -1)).sort()).toEqual([0, 0, 2]);
    const sent = await mails("audition-invitation");
    expect(sent).toHaveLength(2);
    // Without a login the link is an invitation that leads to the singer's own page.
    expect(String(sent[0]?.data["link"])).toMatch(/\/invitation\/[\w-]{43}\?to=%2Fme$/);
    expect((await whereIs(a)).state).toBe("invited");
  });

  test("someone who signs in already gets a plain link to their page, confirms, is moved, and confirms again", async () => {
    const wren = world.people.actor;
    await makeSignUps(world, 1, "unused");
    const signUpId =
      await import("@/app/(season)/productions/[productionId]/auditions/actions").then((m) =>
        m.addSinger({
          productionId,
          name: wren.name,
          email: wren.email,
          low: "",
          high: "",
          notBefore: "",
          notAfter: "",
        }),
      );
    if (!signUpId.ok) throw new Error(signUpId.error.message);
    const id = signUpId.data.signUpId;
    await placeSinger({ productionId, signUpId: id, slotId: slot(30), seenIn: null });
    const actor = await actorOf(wren.userId);
    expect(await listOwnSlots(actor)).toEqual([]);
    await expect(answerSlot(actor, { signUpId: id, answer: "confirm" })).rejects.toMatchObject({
      code: "not-found",
    });

    expect(await inviteSingers({ productionId, dayId, signUpIds: [id] })).toMatchObject({
      ok: true,
      data: { invited: 1 },
    });
    const [mail] = await db
      .select()
      .from(t.outbox)
      .where(and(eq(t.outbox.template, "audition-invitation"), eq(t.outbox.toEmail, wren.email)));
    expect(mail?.data["link"]).toBe("http://localhost:3000/me");
    const now = new Date("2027-03-01T12:00:00Z");
    const [own] = await listOwnSlots(actor);
    expect(own).toMatchObject({
      signUpId: id,
      state: "invited",
      room: "Room 1",
      address: "4 Quay Lane",
      zone: "Europe/London",
    });
    // Slot 30 is the sixteenth of Room 1: 11:30 + 5 × 8 minutes = 12:10; fifteen minutes before that is 11:55.
    expect(own?.startsAt.toISOString()).toBe("2027-03-20T12:10:00.000Z");
    expect(own?.beThereAt.toISOString()).toBe("2027-03-20T11:55:00.000Z");
    await answerSlot(actor, { signUpId: id, answer: "confirm", slotId: slot(30) }, now);
    expect((await whereIs(id)).state).toBe("confirmed");

    for (const to of [32, 30, 32]) {
      const from = (await whereIs(id)).slotId;
      expect(
        await placeSinger({ productionId, signUpId: id, slotId: slot(to), seenIn: from }),
      ).toMatchObject({ ok: true });
    }
    const moved = await db
      .select()
      .from(t.outbox)
      .where(and(eq(t.outbox.template, "audition-moved"), eq(t.outbox.toEmail, wren.email)));
    expect(moved).toHaveLength(3);
    expect((await whereIs(id)).state).toBe("invited");
    await expect(
      answerSlot(actor, { signUpId: id, answer: "confirm", slotId: slot(30) }, now),
    ).rejects.toMatchObject({ code: "stale" });
    await answerSlot(actor, { signUpId: id, answer: "decline" }, now);
    expect((await whereIs(id)).state).toBe("declined");
    await expect(
      answerSlot(actor, { signUpId: id, answer: "confirm" }, new Date("2027-03-20T13:00:00Z")),
    ).rejects.toMatchObject({ code: "refused" });
    for (const other of [world.people.otherActor, world.people.md, world.people.outsiderMd]) {
      await expect(
        answerSlot(await actorOf(other.userId), { signUpId: id, answer: "confirm" }, now),
        other.name,
      ).rejects.toMatchObject({ code: "not-found" });
      expect(await listOwnSlots(await actorOf(other.userId))).toEqual([]);
    }
  });

  test("is not for those who may not plan", async () => {
    const which = { productionId, dayId, signUpIds: null };
    for (const person of [world.people.director, world.people.accompanist, world.people.actor]) {
      as(person.userId);
      expect(await inviteSingers(which), person.name).toMatchObject({
        ok: false,
        error: { code: "not-allowed" },
      });
      expect(await previewInvitations(which), person.name).toMatchObject({
        ok: false,
        error: { code: "not-allowed" },
      });
    }
    as(world.people.outsiderMd.userId);
    expect(await inviteSingers(which)).toMatchObject({ ok: false, error: { code: "not-found" } });
    as(null);
    expect(await inviteSingers(which)).toMatchObject({ ok: false, error: { code: "signed-out" } });
  });
});

describe("placing everyone", () => {
  test("is a proposal: within the times asked for, and it says who cannot be placed and why", async () => {
    const late = await one("late", { notBefore: "15:30" });
    const never = await one("never", { notBefore: "17:00" });
    const early = await one("early", { notAfter: "10:20" });
    const proposal = await proposeFill({ productionId, dayId });
    if (!proposal.ok) throw new Error(proposal.error.message);
    const { placements, unplaced } = proposal.data;
    expect((await whereIs(late)).slotId).toBeNull();
    expect((placements.find((p) => p.signUpId === late)?.time ?? "") >= "15:30").toBe(true);
    expect((placements.find((p) => p.signUpId === early)?.time ?? "x") <= "10:12").toBe(true);
    expect(unplaced.find((u) => u.signUpId === never)?.why).toBe(
      "Asked for after 17:00: no free slot lies there.",
    );
    const day = await readDay(await actorOf(world.people.md.userId), productionId, dayId);
    expect(placements.length + unplaced.length).toBe(day.waiting.length);

    const chosen = placements.map(({ signUpId, slotId }) => ({ signUpId, slotId }));
    const results = await Promise.all(
      [1, 2, 3].map(() => acceptFill({ productionId, dayId, placements: chosen })),
    );
    expect(results.filter((r) => r.ok)).toHaveLength(1);
    expect(results.filter((r) => !r.ok && r.error.code === "stale")).toHaveLength(2);
    expect((await whereIs(early)).slotId).toBe(
      placements.find((p) => p.signUpId === early)?.slotId,
    );
  });

  test("an accepted proposal that does not hold any more writes nothing", async () => {
    const [a, b] = await makeSignUps(world, 2, "hold");
    const free = (await readDay(await actorOf(world.people.md.userId), productionId, dayId)).rooms
      .flatMap((room) => room.items)
      .filter((item) => item.kind === "slot" && item.singer === null);
    const taken =
      (
        await db.select().from(t.slotAssignments).where(eq(t.slotAssignments.dayId, dayId)).limit(1)
      )[0]?.slotId ?? "";
    if (!a || !b || !free[0]) throw new Error("nothing free");
    const result = await acceptFill({
      productionId,
      dayId,
      placements: [
        { signUpId: a, slotId: free[0].id },
        { signUpId: b, slotId: taken },
      ],
    });
    expect(result).toMatchObject({ ok: false, error: { code: "stale" } });
    expect((await whereIs(a)).slotId).toBeNull();
  });
});

describe("a person who joined another production", () => {
  test("sees no slot of a position that has ended", async () => {
    const singer = await makePerson(world.companyId, "Ended Early", {
      kind: "actor",
      productionId,
    });
    const { addSinger } =
      await import("@/app/(season)/productions/[productionId]/auditions/actions");
    const added = await addSinger({ productionId, name: singer.name, email: singer.email });
    if (!added.ok) throw new Error(added.error.message);
    const free = (await readDay(await actorOf(world.people.md.userId), productionId, dayId)).rooms
      .flatMap((r) => r.items)
      .find((i) => i.kind === "slot" && i.singer === null);
    await placeSinger({
      productionId,
      signUpId: added.data.signUpId,
      slotId: free?.id ?? "",
      seenIn: null,
    });
    await inviteSingers({ productionId, dayId, signUpIds: [added.data.signUpId] });
    expect(await listOwnSlots(await actorOf(singer.userId))).toHaveLength(1);
    await db
      .update(t.positions)
      .set({ endedAt: new Date() })
      .where(eq(t.positions.personId, singer.personId));
    expect(await listOwnSlots(await actorOf(singer.userId))).toEqual([]);
  });
});
