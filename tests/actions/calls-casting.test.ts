import { eq } from "drizzle-orm";
import { beforeAll, beforeEach, describe, expect, test } from "vitest";
import {
  cancelCall,
  changeCall,
  checkCall,
  createCall,
  publishCall,
  refreshCall,
  restoreCall,
} from "@/app/(season)/productions/[productionId]/rehearsals/actions";
import { db } from "@/db/client";
import * as t from "@/db/schema";
import { listCallsOfWeek } from "@/lib/data/calls/list";
import { readCall, readCallClashes, readCallDraft } from "@/lib/data/calls/read";
import { as } from "../helpers/as";
import { actorOf, addConflict, callForm, makeRehearsalWorld } from "../helpers/rehearsal-world";
import type { RehearsalWorld } from "../helpers/rehearsal-world";

// Who sees the casting when is the permission "casting:see": the table at once, the stage manager once the list is out,
// the company admin never.

const ASK = "Ask the music director to publish this one: the cast list is not out yet.";

let world: RehearsalWorld;
beforeAll(async () => {
  world = await makeRehearsalWorld();
});
beforeEach(async () => {
  await db.delete(t.pianistSessions);
  await db.delete(t.roomBookings);
  await db.delete(t.calls);
  await db.delete(t.conflicts);
  await db.delete(t.choices).where(eq(t.choices.roleId, world.roles.pip));
  await db.update(t.productions).set({ castPublishedAt: null });
});

type Who = keyof RehearsalWorld["people"];
const actor = (who: Who) => actorOf(world.people[who].userId);
const seen = (callId: string, version: number) => ({
  productionId: world.productionId,
  callId,
  version,
});
const address = (callId: string) => ({ productionId: world.productionId, callId });

async function made(who: Who, change: Record<string, unknown> = {}): Promise<string> {
  as(world.people[who].userId);
  const result = await createCall(
    callForm(world, {
      pianistId: who === "md" ? world.people.accompanist.personId : "",
      ...change,
    }),
  );
  if (!result.ok) throw new Error(JSON.stringify(result.error));
  return result.data.callId;
}

async function publishedByMd(change: Record<string, unknown> = {}): Promise<string> {
  const callId = await made("md", change);
  const result = await publishCall({ ...seen(callId, 1), despite: true });
  if (!result.ok) throw new Error(JSON.stringify(result.error));
  as(world.people.stageManager.userId);
  return callId;
}

/** The value, which the test has put there. */
function there<T>(value: T | undefined): T {
  if (value === undefined) throw new Error("It is not there.");
  return value;
}

/** The saved form of a call as somebody gets it, ready to be sent back. */
async function formOf(who: Who, callId: string) {
  const { draft, version } = await readCallDraft(await actor(who), address(callId));
  return { ...draft, callId, version };
}

const hand = (
  personId: string,
  act: "call" | "excuse",
  keys: string[],
  reason = "Asked to come",
) => ({
  personId,
  act,
  reason,
  keys,
});
const scene = {
  key: "s",
  kind: "scene" as const,
  minutes: 30,
  numberId: "",
  title: "Storm",
  bars: "",
  detail: "",
};
/** Names and words that would tell who is cast in what; the role of Ansel is in a number's title. */
const TELLING = ["Wren Tallis", "Dele Fashanu", "Maren", "Pip"];

function tellsNothing(value: unknown): void {
  const told = JSON.stringify(value);
  for (const word of [...TELLING, world.people.actor.personId, world.people.otherActor.personId])
    expect(told).not.toContain(word);
}

describe("before the cast list is out, the stage manager", () => {
  test("cannot publish, restore or bring up to date what roles sing in, and reads nobody from it", async () => {
    await addConflict(
      world.people.actor.personId,
      "2027-04-06T17:00:00Z",
      "2027-04-06T17:45:00Z",
      "agreed",
    );
    const callId = await made("stageManager");
    const refused = { ok: false, error: { code: "refused", message: ASK } };
    for (const despite of [false, true])
      expect(await publishCall({ ...seen(callId, 1), despite })).toMatchObject(refused);
    expect(await refreshCall(seen(callId, 1))).toMatchObject({
      ok: false,
      error: {
        code: "refused",
        message: expect.stringMatching(/^Ask the music director/) as string,
      },
    });
    const sm = await actor("stageManager");
    tellsNothing(await readCall(sm, address(callId)));
    tellsNothing(await readCallClashes(sm, address(callId)));
    tellsNothing(await checkCall({ ...callForm(world, { pianistId: "" }), callId }));
    const week = await listCallsOfWeek(sm, {
      productionId: world.productionId,
      monday: "2027-04-05",
    });
    expect(week.calls).toMatchObject([{ people: 0, clashes: 0 }]);
    expect(await cancelCall(seen(callId, 1))).toMatchObject({ ok: true });
    expect(await restoreCall({ ...seen(callId, 2), to: "published" })).toMatchObject(refused);
    expect(await restoreCall({ ...seen(callId, 2), to: "draft" })).toMatchObject({ ok: true });
    as(world.people.md.userId);
    expect(await publishCall({ ...seen(callId, 3), despite: true })).toMatchObject({ ok: true });
  });

  test("is refused whether anybody is cast or not, and whoever is called by hand: the refusal tells nothing", async () => {
    const pipSings = { ...callForm(world).blocks[2], key: "one" };
    const nobody = await made("stageManager", { blocks: [pipSings] });
    await db.delete(t.called);
    expect(await publishCall({ ...seen(nobody, 1), despite: true })).toMatchObject({
      error: { message: ASK },
    });
    for (const person of [world.people.actor, world.cover]) {
      const one = { ...callForm(world).blocks[0], key: "one" };
      const callId = await made("stageManager", {
        blocks: [one],
        hand: [hand(person.personId, "call", [])],
      });
      expect(await publishCall({ ...seen(callId, 1), despite: true })).toMatchObject({
        error: { message: ASK },
      });
      const read = await readCall(await actor("stageManager"), address(callId));
      expect(read.blocks[0]?.called).toMatchObject([
        { name: person.name, source: "hand", roles: [] },
      ]);
    }
  });

  test("publishes what nobody sings in, with those called by hand", async () => {
    const callId = await made("stageManager", {
      blocks: [scene],
      hand: [hand(world.people.actor.personId, "call", ["s"])],
    });
    expect((await readCall(await actor("stageManager"), address(callId))).mayPublish).toBe(true);
    expect(await publishCall(seen(callId, 1))).toMatchObject({
      ok: true,
      data: { published: true },
    });
    const read = await readCall(await actor("stageManager"), address(callId));
    expect(read.blocks[0]?.called).toMatchObject([
      { name: "Wren Tallis", source: "hand", reason: "Asked to come", roles: [] },
    ]);
  });

  test("neither sees nor loses who was let off; a call by hand stands where the score calls, too", async () => {
    const callId = await made("md", {
      hand: [hand(world.people.actor.personId, "excuse", ["b1"], "Costume fitting")],
    });
    as(world.people.stageManager.userId);
    const form = await formOf("stageManager", callId);
    expect(form.hand).toEqual([]);
    expect(await changeCall({ ...form, localTime: "18:45" })).toMatchObject({ ok: true });
    const md = await actor("md");
    const kept = await readCall(md, address(callId));
    expect(kept).toMatchObject({ localTime: "18:45" });
    expect(kept.blocks[0]?.called).toMatchObject([
      { name: "Wren Tallis", excused: true, reason: "Costume fitting" },
    ]);
    const again = await formOf("stageManager", callId);
    const call = hand(world.people.otherActor.personId, "call", [again.blocks[1]?.key ?? ""]);
    expect(await changeCall({ ...again, hand: [call] })).toMatchObject({ ok: true });
    const read = await readCall(await actor("stageManager"), address(callId));
    expect(read.blocks.map((block) => block.called.map((person) => person.name))).toEqual([
      [],
      ["Dele Fashanu"],
      [],
    ]);
    expect(read.draft?.hand).toEqual([call]);
  });

  test("of a call by hand, sees clashes of that alone; another draft's people of the score are not counted", async () => {
    await made("md", { localTime: "18:00", roomId: "", leaderId: "", pianistId: "" });
    as(world.people.stageManager.userId);
    const blocks = [{ ...scene, minutes: 60 }];
    const form = callForm(world, {
      pianistId: "",
      leaderId: "",
      blocks,
      hand: [hand(world.people.actor.personId, "call", ["s"])],
    });
    expect(await checkCall({ ...form, callId: null })).toMatchObject({
      ok: true,
      data: { clashes: [] },
    });
    await addConflict(world.people.actor.personId, "2027-04-06T17:00:00Z", "2027-04-06T17:45:00Z");
    const check = await checkCall({ ...form, callId: null });
    expect(check.ok && check.data.clashes.map((clash) => clash.words)).toEqual([
      "Wren Tallis cannot come 18:00–18:45 (Evening class), asked, not agreed yet: 15 min of this call",
    ]);
    as(world.people.md.userId);
    const whole = await checkCall({ ...form, callId: null });
    expect(whole.ok && whole.data.clashes.map((clash) => clash.kind)).toEqual([
      "conflict",
      "person",
    ]);
  });

  test("reads the names in a call the music director published, never roles, waiting or who is let off", async () => {
    const callId = await publishedByMd({
      hand: [hand(world.people.actor.personId, "excuse", ["b3"], "Costume fitting")],
    });
    const read = await readCall(await actor("stageManager"), address(callId));
    expect(read).toMatchObject({ castHidden: true, mayPublish: false, waiting: 0 });
    expect(
      read.blocks.map((block) => block.called.map(({ name, roles }) => [name, roles])),
    ).toEqual([[["Wren Tallis", []]], [["Dele Fashanu", []]], [["Dele Fashanu", []]]]);
    expect(read.blocks.flatMap((block) => block.uncastRoles)).toEqual([]);
    expect(JSON.stringify(read)).not.toContain("Costume fitting");
  });

  test("learns nothing of a recast from a published call: neither out of step, nor by changing it", async () => {
    const callId = await publishedByMd();
    await db.insert(t.choices).values({
      productionId: world.productionId,
      roleId: world.roles.pip,
      personId: world.cover.personId,
      state: "cast",
    });
    const sm = await actor("stageManager");
    const read = await readCall(sm, address(callId));
    expect(read.outOfStep).toEqual({ needed: [], notNeeded: [] });
    expect((await readCall(await actor("md"), address(callId))).outOfStep.needed).toEqual([
      "Imke Dorne",
    ]);
    const form = await formOf("stageManager", callId);
    expect(await changeCall({ ...form, localTime: "18:45" })).toMatchObject({ ok: true });
    const moved = await readCall(sm, address(callId));
    expect(moved.blocks.map((block) => block.called)).toEqual(
      read.blocks.map((block) => block.called),
    );
    const now = await formOf("stageManager", callId);
    const fresh = { ...there(now.blocks[2]), key: "new", minutes: 20 };
    for (const blocks of [
      [...now.blocks, fresh],
      [{ ...there(now.blocks[0]), numberId: world.numbers[2] }],
    ])
      expect(await changeCall({ ...now, blocks })).toMatchObject({
        ok: false,
        error: {
          code: "refused",
          message: expect.stringMatching(/^Ask the music director/) as string,
        },
      });
    expect(await refreshCall(seen(callId, now.version))).toMatchObject({
      error: { code: "refused" },
    });
    const check = await checkCall({ ...now, blocks: [...now.blocks, fresh] });
    expect(check.ok && check.data.blocks[3]?.called).toEqual([]);
    expect(JSON.stringify(check)).not.toContain("Imke Dorne");
    expect(
      await changeCall({ ...now, blocks: [...now.blocks, { ...scene, key: "new" }] }),
    ).toMatchObject({ ok: true });
    as(world.people.md.userId);
    expect(await refreshCall(seen(callId, now.version + 1))).toMatchObject({ ok: true });
  });

  test("sees all of it once the list is out", async () => {
    const callId = await made("stageManager");
    await db.update(t.productions).set({ castPublishedAt: new Date() });
    const read = await readCall(await actor("stageManager"), address(callId));
    expect(read).toMatchObject({ castHidden: false, mayPublish: true });
    expect(read.blocks[0]?.called).toMatchObject([{ name: "Wren Tallis", roles: ["Maren"] }]);
    expect(read.blocks[2]?.uncastRoles).toEqual(["Pip"]);
    expect(await publishCall({ ...seen(callId, 1), despite: true })).toMatchObject({ ok: true });
  });
});

describe("others who read a published call", () => {
  test("reasons are for those who may read conflicts; roles are not for the company admin, even once the list is out", async () => {
    const callId = await publishedByMd({
      hand: [
        hand(world.people.actor.personId, "excuse", ["b1"], "Costume fitting"),
        hand(world.cover.personId, "call", ["b1"], "Sings for Wren, who is ill"),
      ],
    });
    await db.update(t.productions).set({ castPublishedAt: new Date() });
    for (const who of ["md", "assistant", "stageManager"] as const)
      expect((await readCall(await actor(who), address(callId))).blocks[0]?.called).toMatchObject([
        { name: "Wren Tallis", excused: true, reason: "Costume fitting" },
        { name: "Imke Dorne", reason: "Sings for Wren, who is ill" },
      ]);
    for (const who of ["director", "choreographer", "producer"] as const)
      expect((await readCall(await actor(who), address(callId))).blocks[0]?.called).toMatchObject([
        { name: "Wren Tallis", excused: true, reason: null, roles: ["Maren"] },
        { name: "Imke Dorne", reason: null },
      ]);
    const admin = await readCall(await actor("admin"), address(callId));
    expect(admin).toMatchObject({ castHidden: true, draft: null, mayPublish: false, waiting: 0 });
    expect(admin.blocks[0]?.called).toMatchObject([
      { name: "Imke Dorne", reason: null, roles: [] },
    ]);
    expect(admin.blocks[1]?.called).toMatchObject([{ name: "Dele Fashanu", roles: [] }]);
    for (const word of ["Costume fitting", "who is ill", "Maren", "Pip"])
      expect(JSON.stringify(admin)).not.toContain(word);
  });
});

describe("blocks", () => {
  test("the same key twice is refused before anything is written, also for a saved block", async () => {
    const callId = await made("md");
    const form = await formOf("md", callId);
    const [first, second, third] = form.blocks.map((block) => there(block));
    const again = { ...there(second), key: there(first).key };
    const twice = await changeCall({ ...form, blocks: [there(first), again, there(third)] });
    expect(twice).toMatchObject({
      ok: false,
      error: {
        code: "invalid",
        fields: { blocks: "The same block is there twice. Take one out." },
      },
    });
    expect(await db.select().from(t.blocks)).toHaveLength(3);
  });

  test("another call's block keeps its own: its id as a key makes a new block", async () => {
    const [one, other] = [await made("md"), await made("md", { localTime: "21:00" })];
    const theirs = (await formOf("md", other)).blocks[0]?.key ?? "";
    const form = await formOf("md", one);
    const blocks = form.blocks.map((block, index) =>
      index === 0 ? { ...block, key: theirs } : block,
    );
    expect(await changeCall({ ...form, blocks })).toMatchObject({ ok: true });
    expect((await formOf("md", other)).blocks[0]?.key).toBe(theirs);
    expect((await formOf("md", one)).blocks[0]?.key).not.toBe(theirs);
  });
});
