import { eq } from "drizzle-orm";
import { beforeEach, describe, expect, test } from "vitest";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import * as t from "@/db/schema";
import { loadActor } from "@/lib/data/actor";
import { readSeason } from "@/lib/data/season";
import type { PositionKind } from "@/lib/permissions/types";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

const WINDOW = { from: new Date("2027-03-08T00:00:00Z"), to: new Date("2027-05-10T00:00:00Z") };

let world: World;
beforeEach(async () => {
  world = await makeWorld();
});

async function actorOf(userId: string) {
  const actor = await loadActor(userId);
  if (!actor) throw new Error("no such login");
  return actor;
}
const seasonOf = async (userId: string) => readSeason(await actorOf(userId), WINDOW);

type CallOver = Partial<typeof t.calls.$inferInsert> & {
  who?: string[];
  minutes?: number[];
  source?: "hand" | "score";
};

/** A published music call from 18:00 to 20:00 UTC on 24 March, as one block of two hours unless told. */
async function makeCall(productionId: string, over: CallOver = {}): Promise<string> {
  const { who = [], minutes = [120], source = "hand", ...columns } = over;
  const id = newId();
  await db.insert(t.calls).values({
    id,
    productionId,
    kind: "music",
    startsAt: new Date("2027-03-24T18:00:00Z"),
    endsAt: new Date("2027-03-24T20:00:00Z"),
    localDate: "2027-03-24",
    localTime: "18:00",
    zone: "Europe/London",
    state: "published",
    ...columns,
  });
  for (const [place, length] of minutes.entries()) {
    const blockId = newId();
    await db
      .insert(t.blocks)
      .values({ id: blockId, callId: id, place, kind: "scene", minutes: length });
    // One person to a block where there are several blocks.
    const called = minutes.length === 1 ? who : who.slice(place, place + 1);
    for (const personId of called) {
      await db.insert(t.called).values({ blockId, personId, source });
    }
  }
  return id;
}

/** The other company's record of a login of the first, with a position in its production. */
async function alsoAt(userId: string, kind: PositionKind, productionId?: string): Promise<string> {
  const personId = newId();
  await db
    .insert(t.people)
    .values({ id: personId, companyId: world.otherCompanyId, userId, name: "As known there" });
  await db.insert(t.positions).values({
    companyId: world.otherCompanyId,
    personId,
    kind,
    productionId: productionId ?? world.otherProductionId,
  });
  return personId;
}

describe("clashes across companies", () => {
  test("one login called in two companies clashes for who sees both, with names and both events", async () => {
    const { actor, md } = world.people;
    const there = await alsoAt(actor.userId, "actor");
    await alsoAt(md.userId, "music_director");
    const here = await makeCall(world.productionId, { who: [actor.personId] });
    const other = await makeCall(world.otherProductionId, {
      who: [there],
      startsAt: new Date("2027-03-24T19:00:00Z"),
      endsAt: new Date("2027-03-24T21:00:00Z"),
    });
    const season = await seasonOf(md.userId);
    expect(season.productions.map((p) => p.title).sort()).toEqual([
      "A Fair at Candlemas",
      "The Tidewatcher",
    ]);
    expect(season.clashes).toMatchObject([
      {
        kind: "person",
        eventIds: [here, other],
        elsewhere: false,
        from: new Date("2027-03-24T19:00:00Z"),
        to: new Date("2027-03-24T20:00:00Z"),
      },
    ]);
  });

  test("who sees one company learns that the person is engaged, and nothing else of the other", async () => {
    const { actor, md } = world.people;
    const there = await alsoAt(actor.userId, "actor");
    const here = await makeCall(world.productionId, { who: [actor.personId] });
    await makeCall(world.otherProductionId, { who: [there], roomId: world.otherRoomId });
    const season = await seasonOf(md.userId);
    expect(season.clashes).toMatchObject([
      { kind: "person", who: ["Wren Tallis"], eventIds: [here], elsewhere: true },
    ]);
    const told = JSON.stringify(season);
    for (const secret of [
      "Fenmoor",
      "Candlemas",
      "Hall",
      "As known there",
      world.otherCompanyId,
      world.otherProductionId,
      there,
    ]) {
      expect(told).not.toContain(secret);
    }
  });

  test("a draft, a cancelled call and a removed production of another company hold nobody", async () => {
    const { actor, md } = world.people;
    const there = await alsoAt(actor.userId, "actor");
    await makeCall(world.productionId, { who: [actor.personId] });
    await makeCall(world.otherProductionId, { who: [there], state: "draft" });
    await makeCall(world.otherProductionId, { who: [there], state: "cancelled" });
    expect((await seasonOf(md.userId)).clashes).toEqual([]);
    await makeCall(world.otherProductionId, { who: [there] });
    expect((await seasonOf(md.userId)).clashes).toHaveLength(1);
    await db
      .update(t.productions)
      .set({ removedAt: new Date() })
      .where(eq(t.productions.id, world.otherProductionId));
    expect((await seasonOf(md.userId)).clashes).toEqual([]);
  });

  test("two records without a login are two people", async () => {
    const { md } = world.people;
    await alsoAt(md.userId, "music_director");
    const [here, there] = [newId(), newId()];
    await db.insert(t.people).values([
      { id: here, companyId: world.companyId, name: "Ada Quill" },
      { id: there, companyId: world.otherCompanyId, name: "Ada Quill" },
    ]);
    await makeCall(world.productionId, { who: [here] });
    await makeCall(world.otherProductionId, { who: [there] });
    expect((await seasonOf(md.userId)).clashes).toEqual([]);
  });
});

describe("clashes within a company", () => {
  test("two people of one pair of calls are one clash with two names", async () => {
    const { actor, otherActor, md } = world.people;
    const who = [actor.personId, otherActor.personId];
    const calls = [
      await makeCall(world.productionId, { who }),
      await makeCall(world.productionId, {
        who,
        kind: "staging",
        endsAt: new Date("2027-03-24T20:30:00Z"),
      }),
    ];
    expect((await seasonOf(md.userId)).clashes).toMatchObject([
      { kind: "person", who: ["Dele Fashanu", "Wren Tallis"], eventIds: calls },
    ]);
  });

  test("someone called to the last block only is free for another call before it", async () => {
    const { actor, otherActor, md } = world.people;
    await makeCall(world.productionId, {
      who: [otherActor.personId, actor.personId],
      minutes: [60, 60],
    });
    await makeCall(world.productionId, {
      who: [actor.personId],
      minutes: [60],
      endsAt: new Date("2027-03-24T19:00:00Z"),
    });
    expect((await seasonOf(md.userId)).clashes).toEqual([]);
  });

  test("whoever leads a call and is called to it does not clash with themselves", async () => {
    const { md } = world.people;
    await makeCall(world.productionId, {
      who: [md.personId],
      leaderId: md.personId,
      pianistId: md.personId,
    });
    expect((await seasonOf(md.userId)).clashes).toEqual([]);
  });

  test("a room taken twice and a conflict are named to who plans calls; the table sees neither, nor the draft", async () => {
    const { actor, md, director } = world.people;
    await makeCall(world.productionId, { roomId: world.roomId, who: [actor.personId] });
    await makeCall(world.productionId, { roomId: world.roomId, state: "draft", minutes: [120] });
    await db.insert(t.conflicts).values({
      personId: actor.personId,
      startsAt: new Date("2027-03-24T19:00:00Z"),
      endsAt: new Date("2027-03-24T23:00:00Z"),
      localFrom: "2027-03-24",
      localTo: "2027-03-24",
      timeFrom: "19:00",
      timeTo: "23:00",
      zone: "Europe/London",
    });
    const forMd = await seasonOf(md.userId);
    expect(forMd.clashes.map((c) => [c.kind, c.who])).toEqual([
      ["room", ["Room 1"]],
      ["conflict", ["Wren Tallis"]],
    ]);
    const forTable = await seasonOf(director.userId);
    expect(forTable.clashes).toEqual([]);
    expect([forMd.events.length, forTable.events.length]).toEqual([2, 1]);
  });

  test("a way that takes longer than the time between is short by the rest", async () => {
    const { actor, md } = world.people;
    const [venueId, roomId] = [newId(), newId()];
    await db
      .insert(t.venues)
      .values({ id: venueId, companyId: world.companyId, name: "Ropewalk Hall" });
    await db
      .insert(t.rooms)
      .values({ id: roomId, companyId: world.companyId, venueId, name: "Loft" });
    const [venueA = "", venueB = ""] = [world.venueId, venueId].sort();
    await db.insert(t.travelTimes).values({ venueA, venueB, minutes: 35 });
    await makeCall(world.productionId, { who: [actor.personId], roomId: world.roomId });
    await makeCall(world.productionId, {
      who: [actor.personId],
      roomId,
      minutes: [60],
      startsAt: new Date("2027-03-24T20:10:00Z"),
      endsAt: new Date("2027-03-24T21:10:00Z"),
    });
    expect((await seasonOf(md.userId)).clashes).toMatchObject([{ kind: "travel", short: 25 }]);
  });
});

describe("who sees what of a season", () => {
  test("whom the score calls to a draft is kept from the stage manager until the cast list is out", async () => {
    const { actor, md, stageManager } = world.people;
    const who = [actor.personId];
    await makeCall(world.productionId, { who });
    await makeCall(world.productionId, { who, state: "draft", source: "score" });
    await db.insert(t.conflicts).values({
      personId: actor.personId,
      startsAt: new Date("2027-03-24T17:00:00Z"),
      endsAt: new Date("2027-03-24T19:00:00Z"),
      localFrom: "2027-03-24",
      localTo: "2027-03-24",
      zone: "Europe/London",
    });
    const kinds = async (userId: string) =>
      (await seasonOf(userId)).clashes.map((clash) => clash.kind).sort();
    // The published call names them by hand: that they cannot come to it is the stage manager's to know.
    expect(await kinds(md.userId)).toEqual(["conflict", "conflict", "person"]);
    expect(await kinds(stageManager.userId)).toEqual(["conflict"]);
    await db.update(t.calls).set({ state: "draft" });
    await db.update(t.called).set({ source: "score" });
    const drafts = await seasonOf(stageManager.userId);
    expect(JSON.stringify(drafts)).not.toContain("Wren Tallis");
    expect(drafts.events).toHaveLength(2);
    await db.update(t.productions).set({ castPublishedAt: new Date() });
    expect(await kinds(stageManager.userId)).toEqual(["conflict", "conflict", "person"]);
  });

  test("called by hand to a draft is the stage manager's to see; so is a published call, whoever calls", async () => {
    const { actor, stageManager } = world.people;
    const who = [actor.personId];
    await makeCall(world.productionId, { who, state: "draft" });
    await makeCall(world.productionId, { who, source: "score" });
    expect((await seasonOf(stageManager.userId)).clashes).toMatchObject([
      { kind: "person", who: ["Wren Tallis"] },
    ]);
  });

  test("the company admin sees calls, but neither auditions, callbacks nor casting", async () => {
    const dayId = newId();
    await db.insert(t.auditionDays).values({
      id: dayId,
      productionId: world.productionId,
      localDate: "2027-03-20",
      zone: "Europe/London",
      slotMinutes: 8,
    });
    await db.insert(t.auditionRooms).values({
      dayId,
      roomId: world.roomId,
      opensAt: new Date("2027-03-20T10:00:00Z"),
      closesAt: new Date("2027-03-20T16:00:00Z"),
    });
    await db.insert(t.callbackRounds).values({
      productionId: world.productionId,
      title: "Callbacks",
      startsAt: new Date("2027-03-22T10:00:00Z"),
      endsAt: new Date("2027-03-22T16:00:00Z"),
      zone: "Europe/London",
    });
    await makeCall(world.productionId);
    const admin = await seasonOf(world.people.admin.userId);
    expect(admin.events.map((e) => e.kind)).toEqual(["music"]);
    expect(admin.progress.map((p) => [p.roles, p.signUps, p.unanswered])).toEqual([
      [null, null, null],
      [null, null, null],
    ]);
    const md = await seasonOf(world.people.md.userId);
    expect(md.events.map((e) => e.kind)).toEqual(["audition", "callback", "music"]);
    expect(md.progress).toHaveLength(1);
    const sm = await seasonOf(world.people.stageManager.userId);
    expect(sm.progress[0]).toMatchObject({ roles: null, unanswered: 0 });
  });

  test.each(["actor", "accompanist", "outsiderMd"] as const)(
    "the %s has no part of it",
    async (who) => {
      await makeCall(world.productionId);
      const season = await seasonOf(world.people[who].userId);
      expect(season.events).toEqual([]);
      expect(season.productions.map((p) => p.id)).not.toContain(world.productionId);
    },
  );

  test("what one does in productions one does not run is one's own to see", async () => {
    const there = await alsoAt(world.people.md.userId, "accompanist");
    await makeCall(world.otherProductionId, { pianistId: there });
    const mine = await seasonOf(world.people.md.userId);
    expect(mine.elsewhere).toMatchObject([{ kind: "music", production: "A Fair at Candlemas" }]);
    expect((await seasonOf(world.people.assistant.userId)).elsewhere).toEqual([]);
  });

  test("a role is cast when as many are cast as it needs; covers do not count", async () => {
    const [solo, chorus] = [newId(), newId()];
    const { productionId } = world;
    await db.insert(t.roles).values([
      { id: solo, productionId, name: "Orsolo", place: 1 },
      { id: chorus, productionId, name: "Ferrymen", place: 2, needed: 2 },
    ]);
    const choose = (roleId: string, personId: string, kind: "principal" | "cover") =>
      db.insert(t.choices).values({ productionId, roleId, personId, kind, state: "cast" });
    const { actor, otherActor, md } = world.people;
    await choose(solo, actor.personId, "cover");
    await choose(chorus, actor.personId, "principal");
    const castNow = async () => (await seasonOf(md.userId)).progress[0]?.roles;
    expect(await castNow()).toEqual({ all: 2, cast: 0 });
    await choose(chorus, otherActor.personId, "principal");
    expect(await castNow()).toEqual({ all: 2, cast: 1 });
  });
});
