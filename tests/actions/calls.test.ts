import { eq } from "drizzle-orm";
import { beforeAll, beforeEach, describe, expect, test } from "vitest";
import {
  cancelCall,
  changeCall,
  checkCall,
  createCall,
  decideConflict,
  publishCall,
  refreshCall,
  restoreCall,
} from "@/app/(season)/productions/[productionId]/rehearsals/actions";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import * as t from "@/db/schema";
import { listOwnCalls } from "@/lib/data/calls/own";
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

async function checked(change: Record<string, unknown> = {}) {
  const result = await checkCall({ callId: null, ...callForm(world, change) });
  if (!result.ok) throw new Error(JSON.stringify(result.error));
  return result.data;
}

const seen = (callId: string, version: number) => ({
  productionId: world.productionId,
  callId,
  version,
});

describe("who is needed", () => {
  test("follows from the score and the casting; a role without anybody is said", async () => {
    const check = await checked();
    expect(check).toMatchObject({
      from: "18:30",
      to: "20:00",
      minutes: 90,
      day: "Tuesday 6 April",
      clashes: [],
    });
    expect(check.blocks.map((block) => block.called.map((person) => person.name))).toEqual([
      ["Wren Tallis"],
      ["Dele Fashanu"],
      ["Wren Tallis", "Dele Fashanu"],
    ]);
    expect(check.blocks.map((block) => block.uncastRoles)).toEqual([[], [], ["Pip"]]);
    // By hand: Wren waits through number 2, 20 minutes; Dele comes after number 1 and waits for nothing.
    expect(check.waiting).toBe(20);
    expect(check.covers).toEqual([
      { personId: world.cover.personId, name: "Imke Dorne", role: "Maren", keys: ["b1", "b3"] },
    ]);
    expect(await db.select().from(t.calls)).toEqual([]);
  });

  test("is changed by hand only with a reason", async () => {
    const hand = [
      {
        personId: world.people.actor.personId,
        act: "excuse" as const,
        reason: "Costume fitting",
        keys: ["b1"],
      },
      {
        personId: world.cover.personId,
        act: "call" as const,
        reason: "Cover of Maren",
        keys: ["b1"],
      },
    ];
    const check = await checked({ hand });
    expect(
      check.blocks[0]?.called.map(({ name, source, reason, excused }) => ({
        name,
        source,
        reason,
        excused,
      })),
    ).toEqual([
      { name: "Wren Tallis", source: "score", reason: "Costume fitting", excused: true },
      { name: "Imke Dorne", source: "hand", reason: "Cover of Maren", excused: false },
    ]);
    expect(check.blocks[2]?.called[0]).toMatchObject({ name: "Wren Tallis", excused: false });
    const bare = await checkCall({
      callId: null,
      ...callForm(world, { hand: [{ ...hand[0], reason: " " }] }),
    });
    expect(bare).toMatchObject({
      ok: false,
      error: { code: "invalid", fields: { "hand.0.reason": "Write a reason." } },
    });
  });

  test("the saved call keeps it, and says when the casting has moved on", async () => {
    const callId = await made({
      hand: [
        { personId: world.people.actor.personId, act: "excuse", reason: "Fitting", keys: ["b1"] },
      ],
    });
    const md = await actorOf(world.people.md.userId);
    const before = await readCall(md, { productionId: world.productionId, callId });
    expect(before.outOfStep).toEqual({ needed: [], notNeeded: [] });
    await db.insert(t.choices).values({
      productionId: world.productionId,
      roleId: world.roles.pip,
      personId: world.cover.personId,
      state: "cast",
    });
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
    for (const person of [
      people.director,
      people.choreographer,
      people.producer,
      people.accompanist,
      people.actor,
      people.admin,
    ]) {
      as(person.userId);
      for (const result of await Promise.all(all()))
        expect(result).toMatchObject({ ok: false, error: { code: "not-allowed" } });
    }
    for (const person of [people.siblingMd, people.outsiderMd, people.outsiderAdmin]) {
      as(person.userId);
      for (const result of await Promise.all(all()))
        expect(result).toMatchObject({ ok: false, error: { code: "not-found" } });
    }
    as(null);
    for (const result of await Promise.all(all()))
      expect(result).toMatchObject({ ok: false, error: { code: "signed-out" } });
    for (const person of [people.assistant, people.stageManager]) {
      as(person.userId);
      expect(await checkCall({ callId: null, ...callForm(world) })).toMatchObject({ ok: true });
    }
  });

  test("the stage manager changes calls but not who plays", async () => {
    const callId = await made();
    as(world.people.stageManager.userId);
    const form = { ...callForm(world), callId, version: 1 };
    expect(await changeCall({ ...form, pianistId: world.secondPianist.personId })).toMatchObject({
      ok: false,
      error: { code: "not-allowed" },
    });
    expect(await changeCall({ ...form, localTime: "19:00" })).toMatchObject({ ok: true });
  });

  test("before the cast list is out the stage manager is not told who is cast", async () => {
    await db
      .update(t.productions)
      .set({ castPublishedAt: null })
      .where(eq(t.productions.id, world.productionId));
    await addConflict(world.people.actor.personId, "2027-04-06T16:30:00Z", "2027-04-06T17:45:00Z");
    const callId = await made();
    as(world.people.stageManager.userId);
    const check = await checked();
    expect(check.castHidden).toBe(true);
    expect(JSON.stringify(check)).not.toMatch(/Wren|Dele|Imke|Pip/);
    expect(
      JSON.stringify(
        await readCall(await actorOf(world.people.stageManager.userId), {
          productionId: world.productionId,
          callId,
        }),
      ),
    ).not.toMatch(/Wren|Dele/);
    await db
      .update(t.productions)
      .set({ castPublishedAt: new Date() })
      .where(eq(t.productions.id, world.productionId));
  });

  test("rooms, numbers and people of elsewhere are refused beside their fields", async () => {
    const result = await createCall(
      callForm(world, {
        roomId: world.otherRoomId,
        leaderId: world.people.siblingMd.personId,
        pianistId: world.people.actor.personId,
      }),
    );
    expect(result).toMatchObject({ ok: false, error: { code: "invalid" } });
    if (!result.ok)
      expect(Object.keys(result.error.fields ?? {}).sort()).toEqual([
        "leaderId",
        "pianistId",
        "roomId",
      ]);
  });

  test("a conflict of somebody outside the production cannot be decided here", async () => {
    const stranger = await makePerson(world.companyId, "Junia Vale", {
      kind: "actor",
      productionId: world.siblingProductionId,
    });
    const conflictId = await addConflict(
      stranger.personId,
      "2027-04-06T16:30:00Z",
      "2027-04-06T17:45:00Z",
    );
    expect(
      await decideConflict({ productionId: world.productionId, conflictId, state: "agreed" }),
    ).toMatchObject({ ok: false, error: { code: "not-found" } });
  });

  test("an actor sees their own published blocks and nobody else's; drafts are seen by nobody but those who plan", async () => {
    const callId = await made();
    const wren = await actorOf(world.people.actor.userId);
    const after = new Date("2027-04-01T00:00:00Z");
    expect(await listOwnCalls(wren, { after })).toEqual([]);
    const director = await actorOf(world.people.director.userId);
    await expect(
      readCall(director, { productionId: world.productionId, callId }),
    ).rejects.toMatchObject({ code: "not-found" });
    await publishCall({ ...seen(callId, 1), despite: true });
    const own = await listOwnCalls(wren, { after });
    expect(own).toMatchObject([
      {
        production: "The Tidewatcher",
        room: "Room 1",
        address: "4 Quay Lane",
        from: new Date("2027-04-06T17:30:00Z"),
        releasedAt: new Date("2027-04-06T19:00:00Z"),
      },
    ]);
    expect(own[0]?.blocks.map((block) => block.title)).toEqual(["Low Water", "The Ness Light"]);
    expect(JSON.stringify(own)).not.toContain("Dele");
    expect(
      (await readCall(director, { productionId: world.productionId, callId })).draft,
    ).toBeNull();
  });
});
