import { eq } from "drizzle-orm";
import { beforeAll, beforeEach, describe, expect, test } from "vitest";
import { acknowledgeSheet, answerCallback, answerSlot, claimRange } from "@/app/(me)/actions";
import { chooseDecision } from "@/app/(me)/me/(home)/_components/choose-decision";
import { firstPage } from "@/app/_frame/first-page";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import { people, ranges } from "@/db/schema";
import type { OwnSlot } from "@/lib/data/auditions/own";
import type { OwnCallback } from "@/lib/data/callbacks/own";
import { listOwnRecords } from "@/lib/data/me";
import { hearRange } from "@/lib/data/ranges";
import { actorOf } from "../helpers/actor-of";
import { as } from "../helpers/as";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

const NONE = { low: null, high: null };
let world: World;
let secondRecord: string;
beforeAll(async () => {
  world = await makeWorld();
  secondRecord = newId();
  await db.insert(people).values({
    id: secondRecord,
    companyId: world.otherCompanyId,
    userId: world.people.actor.userId,
    name: "Wren Tallis",
    email: world.people.actor.email,
  });
});
beforeEach(async () => {
  await db.delete(ranges);
});

describe("giving one's own range", () => {
  test("it is on file with every company that was chosen, as claimed", async () => {
    const { actor } = world.people;
    as(actor.userId);
    expect(
      await claimRange({
        personIds: [actor.personId, secondRecord],
        range: { low: 55, high: 79 },
        comfortable: { low: 59, high: 74 },
      }),
    ).toMatchObject({ ok: true });
    const records = await listOwnRecords(await actorOf(actor.userId));
    expect(
      records.map((record) => [
        record.company,
        record.sings,
        record.ranges.claimed?.low,
        record.ranges.best?.comfortableHigh,
        record.ranges.best?.kind,
      ]),
    ).toEqual([
      ["Fenmoor Conservatory", false, 55, 74, "claimed"],
      ["Lantern Street Theatre", true, 55, 74, "claimed"],
    ]);
  });

  test("what was heard goes before what is claimed, also when the claim is newer", async () => {
    const { actor, md } = world.people;
    await hearRange(await actorOf(md.userId), {
      productionId: world.productionId,
      personId: actor.personId,
      low: 57,
      high: 77,
      comfortableLow: null,
      comfortableHigh: null,
    });
    as(actor.userId);
    await claimRange({
      personIds: [actor.personId],
      range: { low: 50, high: 84 },
      comfortable: NONE,
    });
    const record = (await listOwnRecords(await actorOf(actor.userId))).find(
      (r) => r.personId === actor.personId,
    );
    expect([record?.ranges.best?.low, record?.ranges.claimed?.low]).toEqual([57, 50]);
  });

  test.each([
    ["no notes", { range: NONE, comfortable: NONE }, "range"],
    ["one note", { range: { low: 60, high: null }, comfortable: NONE }, "range"],
    ["the same note twice", { range: { low: 60, high: 60 }, comfortable: NONE }, "range"],
    ["a range upside down", { range: { low: 72, high: 60 }, comfortable: NONE }, "range"],
    [
      "a comfortable part with one end",
      { range: { low: 55, high: 79 }, comfortable: { low: 60, high: null } },
      "comfortable",
    ],
    [
      "a comfortable part outside the range",
      { range: { low: 55, high: 79 }, comfortable: { low: 50, high: 70 } },
      "comfortable",
    ],
  ])("%s is refused beside the keyboard", async (_what, input, field) => {
    as(world.people.actor.userId);
    expect(await claimRange({ personIds: [world.people.actor.personId], ...input })).toMatchObject({
      ok: false,
      error: { code: "invalid", fields: { [field]: expect.any(String) } },
    });
    expect(await db.$count(ranges)).toBe(0);
  });

  test("nobody gives another's: not a colleague, not the music director, not nobody", async () => {
    const input = { range: { low: 55, high: 79 }, comfortable: NONE };
    for (const other of [
      world.people.otherActor,
      world.people.md,
      world.people.admin,
      world.people.outsiderMd,
    ]) {
      as(other.userId);
      expect(
        await claimRange({ personIds: [world.people.actor.personId], ...input }),
      ).toMatchObject({ ok: false, error: { code: "not-found" } });
      expect(
        await claimRange({ personIds: [other.personId, world.people.actor.personId], ...input }),
      ).toMatchObject({ ok: false, error: { code: "not-found" } });
    }
    as(null);
    expect(await claimRange({ personIds: [world.people.actor.personId], ...input })).toMatchObject({
      ok: false,
      error: { code: "signed-out" },
    });
    expect(await db.$count(ranges, eq(ranges.personId, world.people.actor.personId))).toBe(0);
  });
});

test("what is not one's own cannot be answered, and does not tell whether it exists", async () => {
  const id = newId();
  for (const userId of [world.people.actor.userId, world.people.md.userId, world.strangerId]) {
    as(userId);
    expect(await answerSlot({ signUpId: id, slotId: id, answer: "confirm" })).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
    expect(await answerCallback({ invitationId: id, answer: "yes" })).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
    expect(await acknowledgeSheet({ issueId: id })).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
  }
});

describe("one decision a screen", () => {
  const now = new Date("2031-05-01T12:00:00Z");
  const hour = (h: number): Date => new Date(now.getTime() + h * 3_600_000);
  const slot = (slotId: string, h: number, state: OwnSlot["state"]): OwnSlot => ({
    signUpId: slotId,
    slotId,
    productionId: "p",
    production: "The Tidewatcher",
    company: "Lantern Street Theatre",
    localDate: "2031-05-01",
    zone: "Europe/London",
    startsAt: hour(h),
    endsAt: hour(h + 0.2),
    beThereAt: hour(h - 0.25),
    room: "Room 1",
    venue: "Lantern Street",
    address: "",
    song: null,
    state,
  });
  const callback = (
    invitationId: string,
    h: number | null,
    answer: OwnCallback["answer"],
  ): OwnCallback => ({
    invitationId,
    productionId: "p",
    production: "The Tidewatcher",
    roles: ["Maren"],
    startsAt: h === null ? null : hour(h),
    endsAt: h === null ? null : hour(h + 1),
    zone: "Europe/London",
    room: "Room 2",
    material: null,
    answer,
    publishedAt: hour(-24),
  });
  const own = {
    invitations: [],
    sheets: [],
    slots: [
      slot("over", -2, "invited"),
      slot("asked", 48, "invited"),
      slot("settled", 72, "confirmed"),
    ],
    callbacks: [
      callback("callback", 24, null),
      callback("said-no", 30, "no"),
      callback("gone", -5, null),
    ],
  };

  test("the audition time comes first, then the callback; what is over is not asked any more", () => {
    const { shown, waiting, upcoming } = chooseDecision(own, undefined, now);
    expect(shown?.id).toBe("asked");
    expect(waiting.map((decision) => decision.id)).toEqual(["callback"]);
    expect(upcoming.map((item) => [item.id, item.state?.words])).toEqual([
      ["settled", "Confirmed"],
      ["said-no", "You can’t come"],
    ]);
  });

  test("the one in the address comes up, also an answered one, and an unknown one changes nothing", () => {
    expect(chooseDecision(own, "callback", now).shown?.id).toBe("callback");
    expect(chooseDecision(own, "callback", now).waiting.map((decision) => decision.id)).toEqual([
      "asked",
    ]);
    expect(chooseDecision(own, "settled", now).shown?.id).toBe("settled");
    expect(chooseDecision(own, "over", now).shown?.id).toBe("asked");
    expect(chooseDecision(own, ["settled"], now).shown?.id).toBe("asked");
  });

  test("with nothing to answer there is no decision", () => {
    expect(
      chooseDecision(
        { ...own, slots: [slot("settled", 72, "declined")], callbacks: [] },
        undefined,
        now,
      ).shown,
    ).toBeNull();
  });
});

test("who plans starts at the season, everyone else at their own page", async () => {
  const { md, stageManager, producer, admin, actor, accompanist } = world.people;
  for (const person of [md, stageManager, producer, admin])
    expect(firstPage(await actorOf(person.userId))).toBe("/season");
  for (const userId of [actor.userId, accompanist.userId, world.strangerId])
    expect(firstPage(await actorOf(userId))).toBe("/me");
});
