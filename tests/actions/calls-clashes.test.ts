import { and, eq } from "drizzle-orm";
import { beforeAll, beforeEach, describe, expect, test } from "vitest";
import {
  checkCall,
  createCall,
  decideConflict,
  publishCall,
} from "@/app/(season)/productions/[productionId]/rehearsals/actions";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import * as t from "@/db/schema";
import { as } from "../helpers/as";
import { addConflict, callForm, makeRehearsalWorld } from "../helpers/rehearsal-world";
import type { RehearsalWorld } from "../helpers/rehearsal-world";

let world: RehearsalWorld;
beforeAll(async () => {
  world = await makeRehearsalWorld();
});
beforeEach(async () => {
  await db.delete(t.pianistSessions);
  await db.delete(t.roomBookings);
  await db.delete(t.calls);
  await db.delete(t.conflicts);
  as(world.people.md.userId);
});

async function made(change: Record<string, unknown> = {}): Promise<string> {
  const result = await createCall(callForm(world, change));
  if (!result.ok) throw new Error(JSON.stringify(result.error));
  return result.data.callId;
}

async function published(change: Record<string, unknown> = {}): Promise<string> {
  const callId = await made(change);
  const result = await publishCall({
    productionId: world.productionId,
    callId,
    version: 1,
    despite: true,
  });
  if (!result.ok) throw new Error(JSON.stringify(result.error));
  return callId;
}

async function checked(change: Record<string, unknown> = {}) {
  const result = await checkCall({ callId: null, ...callForm(world, change) });
  if (!result.ok) throw new Error(JSON.stringify(result.error));
  return result.data;
}

describe("clashes while a call is being made", () => {
  test("a music director who leads it and hears callbacks elsewhere then; another company's are not named", async () => {
    const round = {
      title: "Callbacks",
      zone: "Europe/London",
      startsAt: new Date("2027-04-06T17:00:00Z"),
      endsAt: new Date("2027-04-06T18:00:00Z"),
    };
    await db
      .insert(t.callbackRounds)
      .values({ ...round, productionId: world.siblingProductionId, issue: 1 });
    // Runa Oake directs the music of the sibling production, too.
    await db.insert(t.positions).values({
      companyId: world.companyId,
      personId: world.people.md.personId,
      productionId: world.siblingProductionId,
      kind: "music_director",
    });
    const { clashes } = await checked({ leaderId: world.people.md.personId });
    expect(clashes.map((clash) => clash.words)).toEqual([
      "Runa Oake hears the callbacks of Marrow Street, 18:00–19:00: 30 min of this call",
    ]);
    // Nobody has been told of the round: the time counts, what it is does not show.
    await db.update(t.callbackRounds).set({ issue: 0 });
    const untold = await checked({ leaderId: world.people.md.personId });
    expect(untold.clashes.map((clash) => clash.words)).toEqual([
      "Runa Oake is engaged, 18:00–19:00: 30 min of this call",
    ]);
    await db.delete(t.callbackRounds);
    const there = newId();
    await db.insert(t.people).values({
      id: there,
      companyId: world.otherCompanyId,
      userId: world.people.md.userId,
      name: "Runa Oake",
    });
    await db.insert(t.positions).values({
      companyId: world.otherCompanyId,
      personId: there,
      productionId: world.otherProductionId,
      kind: "music_director",
    });
    await db.insert(t.callbackRounds).values({ ...round, productionId: world.otherProductionId });
    const abroad = await checked({ leaderId: world.people.md.personId });
    expect(abroad.clashes.map((clash) => clash.words)).toEqual([
      "Runa Oake is engaged, 18:00–19:00: 30 min of this call",
    ]);
    await db.delete(t.callbackRounds);
  });

  test("a day of auditions in two rooms, one after the other, is heard from the first to the last", async () => {
    const { siblingProductionId: productionId, people } = world;
    await db.insert(t.positions).values({
      companyId: world.companyId,
      personId: people.md.personId,
      productionId,
      kind: "assistant_md",
    });
    const dayId = newId();
    await db.insert(t.auditionDays).values({
      id: dayId,
      productionId,
      localDate: "2027-04-06",
      zone: "Europe/London",
      slotMinutes: 10,
    });
    const room = (roomId: string, from: string, to: string) => ({
      dayId,
      roomId,
      opensAt: new Date(`2027-04-06T${from}:00Z`),
      closesAt: new Date(`2027-04-06T${to}:00Z`),
    });
    await db
      .insert(t.auditionRooms)
      .values([room(world.roomId, "09:00", "11:00"), room(world.secondRoomId, "16:00", "18:00")]);
    const { clashes } = await checked({ leaderId: people.md.personId });
    expect(clashes.map((clash) => clash.words)).toEqual([
      "Runa Oake hears the auditions of Marrow Street, 10:00–19:00: 30 min of this call",
    ]);
    await db.delete(t.auditionRooms);
    await db.delete(t.auditionDays);
  });

  test("a conflict: who, what, by how many minutes, and the blocks that could move", async () => {
    // 17:30Z is 18:30 in London in April (British Summer Time).
    const id = await addConflict(
      world.people.actor.personId,
      "2027-04-06T16:30:00Z",
      "2027-04-06T17:45:00Z",
    );
    const { clashes } = await checked();
    expect(clashes).toHaveLength(1);
    expect(clashes[0]).toMatchObject({
      kind: "conflict",
      words:
        "Wren Tallis cannot come 17:30–18:45 (Evening class), asked, not agreed yet: 15 min of this call",
      conflict: { id, state: "asked" },
    });
    expect(clashes[0]?.remedies.map((remedy) => remedy.label)).toEqual([
      "Move Low Water and The Ness Light after 18:45",
      "Leave Wren Tallis out of Low Water",
      "Start at 18:45, when nothing clashes",
    ]);
    const order = clashes[0]?.remedies.find((remedy) => remedy.kind === "order");
    expect(order).toMatchObject({ keys: ["b2", "b1", "b3"] });
  });

  test("somebody excused has none; neither does a conflict that was declined", async () => {
    const id = await addConflict(
      world.people.actor.personId,
      "2027-04-06T16:30:00Z",
      "2027-04-06T17:45:00Z",
    );
    const hand = [
      {
        personId: world.people.actor.personId,
        act: "excuse",
        reason: "Has a conflict",
        keys: ["b1"],
      },
    ];
    expect((await checked({ hand })).clashes).toEqual([]);
    expect(
      await decideConflict({ productionId: world.productionId, conflictId: id, state: "declined" }),
    ).toEqual({ ok: true, data: { was: "asked" } });
    expect((await checked()).clashes).toEqual([]);
  });

  test("across the clock change the conflict is met by its instants, not by what clocks show", async () => {
    // London's clocks go back at 02:00 on 31 October 2027, to 01:00 (IANA tz database): 00:30 to 03:30 lasts four hours.
    const blocks = callForm(world).blocks.map((block, index) => ({
      ...block,
      minutes: [120, 60, 60][index] ?? 0,
    }));
    const night = { localDate: "2027-10-31", localTime: "00:30", blocks };
    expect(await checked(night)).toMatchObject({ from: "00:30", to: "03:30", minutes: 240 });
    // 00:30 BST is 23:30Z; Wren is needed until 01:30Z and again from 02:30Z, on either side of this conflict.
    await addConflict(world.people.actor.personId, "2027-10-31T01:30:00Z", "2027-10-31T02:30:00Z");
    expect((await checked(night)).clashes).toEqual([]);
    await addConflict(world.people.actor.personId, "2027-10-31T01:00:00Z", "2027-10-31T01:30:00Z");
    expect((await checked(night)).clashes.map((clash) => clash.words)).toEqual([
      "Wren Tallis cannot come 01:00–01:30 (Evening class), asked, not agreed yet: 30 min of this call",
    ]);
    // In spring 01:00 to 02:00 does not exist.
    const spring = await checked({ localDate: "2027-03-28", localTime: "01:30" });
    expect(spring.clockNote).toBe(
      "The clocks go forward over that time: the call would start at 02:30.",
    );
  });

  test("a taken room names its holder and offers a room that is free", async () => {
    await published({ pianistId: "", leaderId: "" });
    const { clashes } = await checked({
      localTime: "19:30",
      pianistId: "",
      leaderId: "",
      blocks: [callForm(world).blocks[0]],
      hand: [{ personId: world.people.actor.personId, act: "excuse", reason: "Called", keys: [] }],
    });
    expect(clashes.map((clash) => clash.words)).toEqual([
      "Room 1 is taken by a music call of The Tidewatcher, 18:30–20:00: 30 min of this call",
    ]);
    expect(clashes[0]?.remedies).toEqual([
      { kind: "room", label: "Take Room 2", roomId: world.secondRoomId },
      {
        kind: "start",
        label: "Start at 20:00, when nothing clashes",
        localDate: "2027-04-06",
        localTime: "20:00",
      },
    ]);
  });

  test("a pianist who plays elsewhere is replaced by one who is free", async () => {
    await published({ leaderId: "", roomId: world.secondRoomId });
    const solo = {
      leaderId: "",
      localTime: "19:00",
      blocks: [{ ...callForm(world).blocks[0], kind: "warm_up", numberId: "", title: "Scales" }],
    };
    const { clashes } = await checked(solo);
    expect(clashes.map((clash) => clash.words)).toEqual([
      "Hanne Briscoe plays for a music call of this production, 18:30–20:00: 30 min of this call",
    ]);
    expect(clashes[0]?.remedies[0]).toEqual({
      kind: "pianist",
      label: "Osric Dlamini plays instead",
      personId: world.secondPianist.personId,
    });
  });

  test("another company's call shows only that the person is engaged", async () => {
    const [theirs] = await elsewhere(
      world.people.actor.userId,
      "2027-04-06T17:00:00Z",
      "2027-04-06T18:00:00Z",
    );
    const { clashes } = await checked();
    expect(clashes.map((clash) => clash.words)).toEqual([
      "Wren Tallis is engaged, 18:00–19:00: 30 min of this call",
    ]);
    expect(JSON.stringify(clashes)).not.toContain("Candlemas");
    await db.update(t.calls).set({ state: "draft" }).where(eq(t.calls.id, theirs));
    expect((await checked()).clashes).toEqual([]);
  });

  test("too few minutes between two venues, by how many", async () => {
    const farVenue = newId();
    const farRoom = newId();
    await db
      .insert(t.venues)
      .values({ id: farVenue, companyId: world.companyId, name: "Quay Sheds" });
    await db.insert(t.rooms).values({
      id: farRoom,
      companyId: world.companyId,
      venueId: farVenue,
      name: "Shed",
      hasPiano: false,
    });
    const [venueA, venueB] = [world.venueId, farVenue].sort();
    await db
      .insert(t.travelTimes)
      .values({ venueA: venueA ?? "", venueB: venueB ?? "", minutes: 25 });
    await published({
      leaderId: "",
      pianistId: "",
      localTime: "17:00",
      roomId: farRoom,
      blocks: [{ ...callForm(world).blocks[0], minutes: 80 }],
    });
    const { clashes } = await checked({ leaderId: "", pianistId: "" });
    expect(clashes.map((clash) => clash.words)).toEqual([
      "Wren Tallis is called to a music call of this production, 17:00–18:20, and has 10 min for the way: 15 min short",
    ]);
    expect(clashes[0]?.remedies.map((remedy) => remedy.label)).toContain(
      "Start at 18:45, when nothing clashes",
    );
  });
});

/** A published call of the other company to which the same login is called under that company's own record. */
async function elsewhere(userId: string, from: string, to: string): Promise<[string]> {
  const personId = newId();
  const [known] = await db
    .select()
    .from(t.people)
    .where(and(eq(t.people.userId, userId), eq(t.people.companyId, world.otherCompanyId)));
  if (!known)
    await db
      .insert(t.people)
      .values({ id: personId, companyId: world.otherCompanyId, userId, name: "W. Tallis" });
  const callId = newId();
  const blockId = newId();
  const minutes = (Date.parse(to) - Date.parse(from)) / 60_000;
  await db.insert(t.calls).values({
    id: callId,
    productionId: world.otherProductionId,
    kind: "staging",
    startsAt: new Date(from),
    endsAt: new Date(to),
    localDate: from.slice(0, 10),
    localTime: "18:00",
    zone: "Europe/London",
    state: "published",
  });
  await db
    .insert(t.blocks)
    .values({ id: blockId, callId, place: 1, kind: "scene", minutes, title: "The fair" });
  await db
    .insert(t.called)
    .values({ blockId, personId: known?.id ?? personId, source: "hand", reason: "Lead" });
  return [callId];
}
