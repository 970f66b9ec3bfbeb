import { and, eq } from "drizzle-orm";
import { beforeAll, beforeEach, describe, expect, test } from "vitest";
import {
  cancelCall, changeCall, checkCall, createCall, decideConflict, publishCall, refreshCall, restoreCall,
} from "@/app/(season)/productions/[productionId]/rehearsals/actions";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import * as t from "@/db/schema";
import { listOwnCalls } from "@/lib/data/calls/own";
import { listCallsOfWeek } from "@/lib/data/calls/list";
import { readCall } from "@/lib/data/calls/read";
import { as } from "../helpers/as";
import { actorOf, addConflict, callForm, makeRehearsalWorld } from "../helpers/rehearsal-world";
import type { RehearsalWorld } from "../helpers/rehearsal-world";
import { makePerson } from "../helpers/world";

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
  const result = await publishCall({ productionId: world.productionId, callId, version: 1, despite: true });
  if (!result.ok) throw new Error(JSON.stringify(result.error));
  return callId;
}

async function checked(change: Record<string, unknown> = {}) {
  const result = await checkCall({ callId: null, ...callForm(world, change) });
  if (!result.ok) throw new Error(JSON.stringify(result.error));
  return result.data;
}

const bookings = () => db.select().from(t.roomBookings);
const sessions = () => db.select().from(t.pianistSessions);
const seen = (callId: string, version: number) => ({ productionId: world.productionId, callId, version });

describe("who is needed", () => {
  test("follows from the score and the casting; a role without anybody is said", async () => {
    const check = await checked();
    expect(check).toMatchObject({ from: "18:30", to: "20:00", minutes: 90, day: "Tuesday 6 April", clashes: [] });
    expect(check.blocks.map((block) => block.called.map((person) => person.name))).toEqual([
      ["Wren Tallis"], ["Dele Fashanu"], ["Wren Tallis", "Dele Fashanu"],
    ]);
    expect(check.blocks.map((block) => block.uncastRoles)).toEqual([[], [], ["Pip"]]);
    // By hand: Wren waits through number 2, 20 minutes; Dele comes after number 1 and waits for nothing.
    expect(check.waiting).toBe(20);
    expect(check.covers).toEqual([{ personId: world.cover.personId, name: "Imke Dorne", role: "Maren", keys: ["b1", "b3"] }]);
    expect(await db.select().from(t.calls)).toEqual([]);
  });

  test("is changed by hand only with a reason", async () => {
    const hand = [
      { personId: world.people.actor.personId, act: "excuse" as const, reason: "Costume fitting", keys: ["b1"] },
      { personId: world.cover.personId, act: "call" as const, reason: "Cover of Maren", keys: ["b1"] },
    ];
    const check = await checked({ hand });
    expect(check.blocks[0]?.called.map(({ name, source, reason, excused }) => ({ name, source, reason, excused }))).toEqual([
      { name: "Wren Tallis", source: "score", reason: "Costume fitting", excused: true },
      { name: "Imke Dorne", source: "hand", reason: "Cover of Maren", excused: false },
    ]);
    expect(check.blocks[2]?.called[0]).toMatchObject({ name: "Wren Tallis", excused: false });
    const bare = await checkCall({ callId: null, ...callForm(world, { hand: [{ ...hand[0], reason: " " }] }) });
    expect(bare).toMatchObject({ ok: false, error: { code: "invalid", fields: { "hand.0.reason": "Write a reason." } } });
  });

  test("the saved call keeps it, and says when the casting has moved on", async () => {
    const callId = await made({ hand: [{ personId: world.people.actor.personId, act: "excuse", reason: "Fitting", keys: ["b1"] }] });
    const md = await actorOf(world.people.md.userId);
    const before = await readCall(md, { productionId: world.productionId, callId });
    expect(before.outOfStep).toEqual({ needed: [], notNeeded: [] });
    await db.insert(t.choices).values({ productionId: world.productionId, roleId: world.roles.pip, personId: world.cover.personId, state: "cast" });
    const after = await readCall(md, { productionId: world.productionId, callId });
    expect(after.outOfStep).toEqual({ needed: ["Imke Dorne"], notNeeded: [] });
    expect(await refreshCall(seen(callId, 1))).toMatchObject({ ok: true });
    const fresh = await readCall(md, { productionId: world.productionId, callId });
    expect(fresh.outOfStep).toEqual({ needed: [], notNeeded: [] });
    expect(fresh.blocks.map((block) => block.key)).toEqual(before.blocks.map((block) => block.key));
    expect(fresh.blocks[0]?.called[0]).toMatchObject({ excused: true, reason: "Fitting" });
    await db.delete(t.choices).where(eq(t.choices.roleId, world.roles.pip));
  });
});

describe("clashes while a call is being made", () => {
  test("a conflict: who, what, by how many minutes, and the blocks that could move", async () => {
    // 17:30Z is 18:30 in London in April (British Summer Time).
    const id = await addConflict(world.people.actor.personId, "2027-04-06T16:30:00Z", "2027-04-06T17:45:00Z");
    const { clashes } = await checked();
    expect(clashes).toHaveLength(1);
    expect(clashes[0]).toMatchObject({
      kind: "conflict",
      words: "Wren Tallis cannot come 17:30–18:45 (Evening class), asked, not agreed yet: 15 min of this call",
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
    const id = await addConflict(world.people.actor.personId, "2027-04-06T16:30:00Z", "2027-04-06T17:45:00Z");
    const hand = [{ personId: world.people.actor.personId, act: "excuse", reason: "Has a conflict", keys: ["b1"] }];
    expect((await checked({ hand })).clashes).toEqual([]);
    expect(await decideConflict({ productionId: world.productionId, conflictId: id, state: "declined" })).toEqual({ ok: true, data: { was: "asked" } });
    expect((await checked()).clashes).toEqual([]);
  });

  test("across the clock change the conflict is met by its instants, not by what clocks show", async () => {
    // London's clocks go back at 02:00 on 31 October 2027, to 01:00 (IANA tz database): 00:30 to 03:30 lasts four hours.
    const blocks = callForm(world).blocks.map((block, index) => ({ ...block, minutes: [120, 60, 60][index] ?? 0 }));
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
    expect(spring.clockNote).toBe("The clocks go forward over that time: the call would start at 02:30.");
  });

  test("a taken room names its holder and offers a room that is free", async () => {
    await published({ pianistId: "", leaderId: "" });
    const { clashes } = await checked({ localTime: "19:30", pianistId: "", leaderId: "", blocks: [callForm(world).blocks[0]], hand: [{ personId: world.people.actor.personId, act: "excuse", reason: "Called", keys: [] }] });
    expect(clashes.map((clash) => clash.words)).toEqual(["Room 1 is taken by a music call of The Tidewatcher, 18:30–20:00: 30 min of this call"]);
    expect(clashes[0]?.remedies).toEqual([
      { kind: "room", label: "Take Room 2", roomId: world.secondRoomId },
      { kind: "start", label: "Start at 20:00, when nothing clashes", localDate: "2027-04-06", localTime: "20:00" },
    ]);
  });

  test("a pianist who plays elsewhere is replaced by one who is free", async () => {
    await published({ leaderId: "", roomId: world.secondRoomId });
    const solo = { leaderId: "", localTime: "19:00", blocks: [{ ...callForm(world).blocks[0], kind: "warm_up", numberId: "", title: "Scales" }] };
    const { clashes } = await checked(solo);
    expect(clashes.map((clash) => clash.words)).toEqual(["Hanne Briscoe plays for a music call of this production, 18:30–20:00: 30 min of this call"]);
    expect(clashes[0]?.remedies[0]).toEqual({ kind: "pianist", label: "Osric Dlamini plays instead", personId: world.secondPianist.personId });
  });

  test("another company's call shows only that the person is engaged", async () => {
    const [theirs] = await elsewhere(world.people.actor.userId, "2027-04-06T17:00:00Z", "2027-04-06T18:00:00Z");
    const { clashes } = await checked();
    expect(clashes.map((clash) => clash.words)).toEqual(["Wren Tallis is engaged, 18:00–19:00: 30 min of this call"]);
    expect(JSON.stringify(clashes)).not.toContain("Candlemas");
    await db.update(t.calls).set({ state: "draft" }).where(eq(t.calls.id, theirs));
    expect((await checked()).clashes).toEqual([]);
  });

  test("too few minutes between two venues, by how many", async () => {
    const farVenue = newId();
    const farRoom = newId();
    await db.insert(t.venues).values({ id: farVenue, companyId: world.companyId, name: "Quay Sheds" });
    await db.insert(t.rooms).values({ id: farRoom, companyId: world.companyId, venueId: farVenue, name: "Shed", hasPiano: false });
    const [venueA, venueB] = [world.venueId, farVenue].sort();
    await db.insert(t.travelTimes).values({ venueA: venueA ?? "", venueB: venueB ?? "", minutes: 25 });
    await published({ leaderId: "", pianistId: "", localTime: "17:00", roomId: farRoom, blocks: [{ ...callForm(world).blocks[0], minutes: 80 }] });
    const { clashes } = await checked({ leaderId: "", pianistId: "" });
    expect(clashes.map((clash) => clash.words)).toEqual([
      "Wren Tallis is called to a music call of this production, 17:00–18:20, and has 10 min for the way: 15 min short",
    ]);
    expect(clashes[0]?.remedies.map((remedy) => remedy.label)).toContain("Start at 18:45, when nothing clashes");
  });
});

/** A published call of the other company to which the same login is called under that company's own record. */
async function elsewhere(userId: string, from: string, to: string): Promise<[string]> {
  const personId = newId();
  const [known] = await db.select().from(t.people).where(and(eq(t.people.userId, userId), eq(t.people.companyId, world.otherCompanyId)));
  if (!known) await db.insert(t.people).values({ id: personId, companyId: world.otherCompanyId, userId, name: "W. Tallis" });
  const callId = newId();
  const blockId = newId();
  const minutes = (Date.parse(to) - Date.parse(from)) / 60_000;
  await db.insert(t.calls).values({ id: callId, productionId: world.otherProductionId, kind: "staging", startsAt: new Date(from), endsAt: new Date(to), localDate: from.slice(0, 10), localTime: "18:00", zone: "Europe/London", state: "published" });
  await db.insert(t.blocks).values({ id: blockId, callId, place: 1, kind: "scene", minutes, title: "The fair" });
  await db.insert(t.called).values({ blockId, personId: known?.id ?? personId, source: "hand", reason: "Lead" });
  return [callId];
}

describe("publishing", () => {
  test("takes the room and the pianist; cancelling frees them; undo takes them again while they are free", async () => {
    const callId = await published();
    expect(await bookings()).toMatchObject([{ callId, roomId: world.roomId, startsAt: new Date("2027-04-06T17:30:00Z"), endsAt: new Date("2027-04-06T19:00:00Z") }]);
    expect(await sessions()).toMatchObject([{ callId, bookeeId: world.people.accompanist.userId }]);
    expect(await cancelCall(seen(callId, 2))).toEqual({ ok: true, data: { was: "published", version: 3 } });
    expect([await bookings(), await sessions()]).toEqual([[], []]);
    expect(await restoreCall({ ...seen(callId, 3), to: "published" })).toMatchObject({ ok: true });
    expect(await bookings()).toHaveLength(1);
    await cancelCall(seen(callId, 4));
    await published({ pianistId: "", leaderId: "" });
    expect(await restoreCall({ ...seen(callId, 5), to: "published" })).toMatchObject({
      ok: false,
      error: { code: "taken", message: "Room 1 is taken by a music call of The Tidewatcher, 18:30–20:00. Choose another room, or a time outside that." },
    });
    expect(await restoreCall({ ...seen(callId, 5), to: "draft" })).toMatchObject({ ok: true });
  });

  test("a draft may hold a clash; people's clashes are asked about once and do not stand in the way", async () => {
    await addConflict(world.people.actor.personId, "2027-04-06T16:30:00Z", "2027-04-06T17:45:00Z", "agreed");
    const callId = await made();
    const week = await listCallsOfWeek(await actorOf(world.people.md.userId), { productionId: world.productionId, monday: "2027-04-05" });
    expect(week.calls).toMatchObject([{ id: callId, state: "draft", clashes: 1, people: 2 }]);
    expect(await publishCall(seen(callId, 1))).toEqual({
      ok: true,
      data: { published: false, ask: ["Wren Tallis cannot come 17:30–18:45 (Evening class), agreed: 15 min of this call"] },
    });
    expect(await bookings()).toEqual([]);
    expect(await publishCall({ ...seen(callId, 1), despite: true })).toEqual({ ok: true, data: { published: true } });
  });

  test("twenty calls into one room at once: exactly one gets it", async () => {
    const ids = [];
    for (let n = 0; n < 20; n += 1) ids.push(await made({ pianistId: "", leaderId: "", localTime: `18:${String(30 + n)}` }));
    const results = await Promise.all(ids.map((callId) => publishCall({ ...seen(callId, 1), despite: true })));
    expect(results.filter((result) => result.ok)).toHaveLength(1);
    expect(results.filter((result) => !result.ok).map((result) => !result.ok && result.error.code)).toEqual(Array.from({ length: 19 }, () => "taken"));
    expect(await bookings()).toHaveLength(1);
    const states = await db.select({ state: t.calls.state }).from(t.calls).where(eq(t.calls.state, "published"));
    expect(states).toHaveLength(1);
  });

  test("one pianist for two rooms at once: the second is refused with where and when", async () => {
    const [first, second] = [await made({ leaderId: "" }), await made({ leaderId: "", roomId: world.secondRoomId })];
    const results = await Promise.all([first, second].map((callId) => publishCall({ ...seen(callId, 1), despite: true })));
    const refused = results.find((result) => !result.ok);
    expect(results.filter((result) => result.ok)).toHaveLength(1);
    expect(refused).toMatchObject({ ok: false, error: { code: "taken" } });
    expect(refused && !refused.ok && refused.error.message).toMatch(/^Hanne Briscoe plays for The Tidewatcher in Room [12], 18:30–20:00\. Choose another pianist/);
    expect([await bookings(), await sessions()].map((rows) => rows.length)).toEqual([1, 1]);
  });

  test("a published call that changes takes its new time, or nothing changes at all", async () => {
    const callId = await published();
    const blocking = await published({ localTime: "21:00", pianistId: "", leaderId: "", blocks: [{ ...callForm(world).blocks[0], kind: "scene", numberId: "", title: "Storm" }] });
    const form = { ...callForm(world), callId };
    expect(await changeCall({ ...form, version: 2, localTime: "20:00" })).toMatchObject({ ok: false, error: { code: "taken" } });
    expect(await bookings()).toHaveLength(2);
    expect((await db.select().from(t.calls).where(eq(t.calls.id, callId)))[0]).toMatchObject({ localTime: "18:30", version: 2 });
    expect(await changeCall({ ...form, version: 2, localTime: "19:30" })).toMatchObject({ ok: true });
    expect((await bookings()).find((row) => row.callId === callId)?.startsAt).toEqual(new Date("2027-04-06T18:30:00Z"));
    expect((await sessions())[0]?.startsAt).toEqual(new Date("2027-04-06T18:30:00Z"));
    expect(blocking).not.toBe(callId);
    expect(await changeCall({ ...form, version: 2 })).toMatchObject({ ok: false, error: { code: "stale" } });
    expect(await publishCall(seen(callId, 2))).toMatchObject({ ok: false, error: { code: "stale" } });
  });
});

describe("who may", () => {
  test("the music team and the stage manager plan; everyone else is refused, strangers find nothing", async () => {
    const callId = await made();
    const { people, productionId } = world;
    const all = () => [
      checkCall({ callId: null, ...callForm(world) }),
      createCall(callForm(world)),
      changeCall({ ...callForm(world), callId, version: 1 }),
      refreshCall(seen(callId, 1)),
      publishCall(seen(callId, 1)),
      cancelCall(seen(callId, 1)),
      restoreCall({ ...seen(callId, 1), to: "draft" }),
      decideConflict({ productionId, conflictId: newId(), state: "agreed" }),
    ];
    for (const person of [people.director, people.choreographer, people.producer, people.accompanist, people.actor, people.admin]) {
      as(person.userId);
      for (const result of await Promise.all(all())) expect(result).toMatchObject({ ok: false, error: { code: "not-allowed" } });
    }
    for (const person of [people.siblingMd, people.outsiderMd, people.outsiderAdmin]) {
      as(person.userId);
      for (const result of await Promise.all(all())) expect(result).toMatchObject({ ok: false, error: { code: "not-found" } });
    }
    as(null);
    for (const result of await Promise.all(all())) expect(result).toMatchObject({ ok: false, error: { code: "signed-out" } });
    for (const person of [people.assistant, people.stageManager]) {
      as(person.userId);
      expect(await checkCall({ callId: null, ...callForm(world) })).toMatchObject({ ok: true });
    }
  });

  test("the stage manager changes calls but not who plays", async () => {
    const callId = await made();
    as(world.people.stageManager.userId);
    const form = { ...callForm(world), callId, version: 1 };
    expect(await changeCall({ ...form, pianistId: world.secondPianist.personId })).toMatchObject({ ok: false, error: { code: "not-allowed" } });
    expect(await changeCall({ ...form, localTime: "19:00" })).toMatchObject({ ok: true });
  });

  test("before the cast list is out the stage manager is not told who is cast", async () => {
    await db.update(t.productions).set({ castPublishedAt: null }).where(eq(t.productions.id, world.productionId));
    await addConflict(world.people.actor.personId, "2027-04-06T16:30:00Z", "2027-04-06T17:45:00Z");
    const callId = await made();
    as(world.people.stageManager.userId);
    const check = await checked();
    expect(check.castHidden).toBe(true);
    expect(JSON.stringify(check)).not.toMatch(/Wren|Dele|Imke|Pip/);
    expect(JSON.stringify(await readCall(await actorOf(world.people.stageManager.userId), { productionId: world.productionId, callId }))).not.toMatch(/Wren|Dele/);
    await db.update(t.productions).set({ castPublishedAt: new Date() }).where(eq(t.productions.id, world.productionId));
  });

  test("rooms, numbers and people of elsewhere are refused beside their fields", async () => {
    const result = await createCall(callForm(world, { roomId: world.otherRoomId, leaderId: world.people.siblingMd.personId, pianistId: world.people.actor.personId }));
    expect(result).toMatchObject({ ok: false, error: { code: "invalid" } });
    if (!result.ok) expect(Object.keys(result.error.fields ?? {}).sort()).toEqual(["leaderId", "pianistId", "roomId"]);
  });

  test("a conflict of somebody outside the production cannot be decided here", async () => {
    const stranger = await makePerson(world.companyId, "Junia Vale", { kind: "actor", productionId: world.siblingProductionId });
    const conflictId = await addConflict(stranger.personId, "2027-04-06T16:30:00Z", "2027-04-06T17:45:00Z");
    expect(await decideConflict({ productionId: world.productionId, conflictId, state: "agreed" })).toMatchObject({ ok: false, error: { code: "not-found" } });
  });

  test("an actor sees their own published blocks and nobody else's; drafts are seen by nobody but those who plan", async () => {
    const callId = await made();
    const wren = await actorOf(world.people.actor.userId);
    const after = new Date("2027-04-01T00:00:00Z");
    expect(await listOwnCalls(wren, { after })).toEqual([]);
    const director = await actorOf(world.people.director.userId);
    await expect(readCall(director, { productionId: world.productionId, callId })).rejects.toMatchObject({ code: "not-found" });
    await publishCall({ ...seen(callId, 1), despite: true });
    const own = await listOwnCalls(wren, { after });
    expect(own).toMatchObject([{ production: "The Tidewatcher", room: "Room 1", address: "4 Quay Lane", from: new Date("2027-04-06T17:30:00Z"), releasedAt: new Date("2027-04-06T19:00:00Z") }]);
    expect(own[0]?.blocks.map((block) => block.title)).toEqual(["Low Water", "The Ness Light"]);
    expect(JSON.stringify(own)).not.toContain("Dele");
    expect((await readCall(director, { productionId: world.productionId, callId })).draft).toBeNull();
  });
});
