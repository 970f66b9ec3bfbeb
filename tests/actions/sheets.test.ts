import { eq } from "drizzle-orm";
import { beforeAll, beforeEach, describe, expect, test } from "vitest";
import { acknowledgeSheet } from "@/app/(me)/actions";
import { issueSheet } from "@/app/(season)/productions/[productionId]/call-sheets/actions";
import {
  changeCall,
  createCall,
  publishCall,
} from "@/app/(season)/productions/[productionId]/rehearsals/actions";
import { db } from "@/db/client";
import * as t from "@/db/schema";
import { readSheetDay } from "@/lib/data/sheets/issues";
import { listAcknowledgements, listSheetDays, readIssue } from "@/lib/data/sheets/read";
import { listOwnSheets, readOwnSheet } from "@/lib/data/sheets/own";
import { as } from "../helpers/as";
import { actorOf, addConflict, callForm, makeRehearsalWorld } from "../helpers/rehearsal-world";
import type { RehearsalWorld } from "../helpers/rehearsal-world";

let world: RehearsalWorld;
let callId: string;
const localDate = "2027-04-06";

beforeAll(async () => {
  world = await makeRehearsalWorld();
  await db
    .update(t.people)
    .set({ phone: "0000 555 014" })
    .where(eq(t.people.id, world.people.stageManager.personId));
});
beforeEach(async () => {
  await db.delete(t.acknowledgements);
  await db.delete(t.callSheetIssues);
  await db.delete(t.outbox);
  await db.delete(t.pianistSessions);
  await db.delete(t.roomBookings);
  await db.delete(t.calls);
  await db.delete(t.conflicts);
  callId = await publishedCall();
  as(world.people.stageManager.userId);
});

async function publishedCall(change: Record<string, unknown> = {}): Promise<string> {
  as(world.people.md.userId);
  const blocks = [...callForm(world).blocks];
  blocks.splice(2, 0, {
    ...blocks[0]!,
    key: "pause",
    kind: "break" as never,
    numberId: "",
    minutes: 15,
  });
  const made = await createCall(callForm(world, { blocks, ...change }));
  if (!made.ok) throw new Error(JSON.stringify(made.error));
  const published = await publishCall({
    productionId: world.productionId,
    callId: made.data.callId,
    version: 1,
    despite: true,
  });
  if (!published.ok) throw new Error(JSON.stringify(published.error));
  return made.data.callId;
}

async function day() {
  return readSheetDay(await actorOf(world.people.stageManager.userId), {
    productionId: world.productionId,
    localDate,
  });
}

async function issued(notes = "") {
  const result = await issueSheet({
    productionId: world.productionId,
    localDate,
    seen: (await day()).seen,
    notes,
  });
  if (!result.ok) throw new Error(JSON.stringify(result.error));
  return result.data;
}

async function movedLater() {
  as(world.people.md.userId);
  const [call] = await db.select().from(t.calls).where(eq(t.calls.id, callId));
  const kept = await db
    .select()
    .from(t.blocks)
    .where(eq(t.blocks.callId, callId))
    .orderBy(t.blocks.place);
  const blocks = [kept[1], kept[0], kept[2], kept[3]].map((block) => ({
    key: block!.id,
    kind: block!.kind,
    minutes: block!.minutes,
    numberId: block!.numberId ?? "",
    title: "",
    bars: "",
    detail: "",
  }));
  const result = await changeCall({
    ...callForm(world, { blocks }),
    callId,
    version: call!.version,
  });
  expect(result).toMatchObject({ ok: true });
  as(world.people.stageManager.userId);
}

describe("the sheet of a day", () => {
  test("names people, releases, music, what comes next and who is away", async () => {
    await addConflict(
      world.cover.personId,
      "2027-04-06T16:00:00Z",
      "2027-04-06T18:00:00Z",
      "agreed",
    );
    await addConflict(
      world.people.otherActor.personId,
      "2027-04-06T21:00:00Z",
      "2027-04-06T22:00:00Z",
      "asked",
    );
    await publishedCall({ localDate: "2027-04-09", kind: "staging", roomId: world.secondRoomId });
    const { sheet } = await day();
    expect(
      sheet.blocks.map((block) => [
        block.from,
        block.to,
        block.numberLabel,
        block.title,
        block.who,
        block.where,
      ]),
    ).toEqual([
      ["18:30", "19:00", "1", "Low Water", ["Wren Tallis"], "Room 1"],
      ["19:00", "19:20", "2", "A Letter from Ansel", ["Dele Fashanu"], "Room 1"],
      ["19:20", "19:35", undefined, "Break", [], ""],
      ["19:35", "20:15", "3", "The Ness Light", ["Wren Tallis", "Dele Fashanu"], "Room 1"],
    ]);
    expect(sheet.released).toEqual([
      { who: "Wren Tallis", at: "20:15" },
      { who: "Dele Fashanu", at: "20:15" },
    ]);
    expect(sheet.music).toEqual([
      "Runa Oake leads",
      "Hanne Briscoe at the piano, rests 19:20–19:35",
    ]);
    expect(sheet.tomorrow).toEqual(["Fri 9 Apr, 18:30, staging, Room 2"]);
    expect(sheet.away).toEqual(["Imke Dorne 17:00–19:00 (agreed)"]);
    expect(sheet.notes).toEqual(["Room 1, Lantern Street, 4 Quay Lane"]);
    expect(sheet.contact).toBe("Late? Bram Teller, stage manager, 0000 555 014");
    // Why somebody is away is between them and the music team.
    expect(JSON.stringify(sheet)).not.toContain("Evening class");
  });

  test("is a numbered snapshot that stays the same after the call changes, and says what changed", async () => {
    const first = await issued("Bring your own book and a pencil.");
    expect(first).toMatchObject({ number: 1, told: 4 });
    const manager = await actorOf(world.people.stageManager.userId);
    const before = await readIssue(manager, {
      productionId: world.productionId,
      issueId: first.issueId,
    });
    expect(before.sheet.notes).toContain("Bring your own book and a pencil.");
    await movedLater();
    expect(
      await readIssue(manager, { productionId: world.productionId, issueId: first.issueId }),
    ).toEqual(before);
    const second = await issued();
    expect(second.number).toBe(2);
    const after = await readIssue(manager, {
      productionId: world.productionId,
      issueId: second.issueId,
    });
    expect(after.sheet.changed).toContain("Low Water moves from 18:30 to 18:50");
    expect(after.sheet.changed).toContain("Wren Tallis is called at 18:50, not 18:30");
    expect(after.sheet.replaces).toMatch(/^the one of \d{2}:\d{2}$/);
    const old = await readIssue(manager, {
      productionId: world.productionId,
      issueId: first.issueId,
    });
    expect(old.sheet).toEqual(before.sheet);
    expect(old.newest.number).toBe(2);
  });

  test("tells those concerned once, each with their own changes", async () => {
    await issued();
    const mails = await db.select().from(t.outbox).where(eq(t.outbox.template, "call-sheet"));
    expect(mails.map((mail) => mail.toEmail).sort()).toEqual(
      [world.people.md, world.people.accompanist, world.people.actor, world.people.otherActor]
        .map((person) => person.email)
        .sort(),
    );
    await movedLater();
    await issued();
    const again = (await db.select().from(t.outbox)).filter((mail) => mail.data["number"] === 2);
    const wren = again.find((mail) => mail.toEmail === world.people.actor.email);
    expect(wren?.data["changes"]).toEqual([
      "Low Water moves from 18:30 to 18:50",
      "Wren Tallis is called at 18:50, not 18:30",
    ]);
    expect(JSON.stringify(wren?.data)).not.toContain("Dele");
  });

  test("is not issued twice for the same thing, nor over a change that came in between", async () => {
    const { seen } = await day();
    const input = { productionId: world.productionId, localDate, seen, notes: "" };
    const both = await Promise.all([issueSheet(input), issueSheet(input)]);
    expect(both.filter((result) => result.ok)).toHaveLength(1);
    expect(both.find((result) => !result.ok)).toMatchObject({
      ok: false,
      error: { code: "stale" },
    });
    expect(await issueSheet({ ...input, seen: (await day()).seen })).toMatchObject({
      ok: false,
      error: {
        code: "refused",
        message: "Nothing changed since issue 1. Everyone has this already.",
      },
    });
    const before = (await day()).seen;
    await movedLater();
    expect(await issueSheet({ ...input, seen: before })).toMatchObject({
      ok: false,
      error: { code: "stale" },
    });
  });

  test("an empty day has no sheet", async () => {
    const empty = "2027-04-07";
    const manager = await actorOf(world.people.stageManager.userId);
    const { seen } = await readSheetDay(manager, {
      productionId: world.productionId,
      localDate: empty,
    });
    expect(
      await issueSheet({ productionId: world.productionId, localDate: empty, seen, notes: "" }),
    ).toMatchObject({ ok: false, error: { code: "refused" } });
  });
});

describe("reading and acknowledging", () => {
  test("an actor reads their own part, and nobody else's name is in it", async () => {
    const { issueId } = await issued();
    const wren = await actorOf(world.people.actor.userId);
    expect(await listOwnSheets(wren)).toMatchObject([
      { issueId, number: 1, from: "18:30", releasedAt: "20:15", acknowledgedAt: null },
    ]);
    const own = await readOwnSheet(wren, issueId);
    expect(own.blocks.map((block) => [block.from, block.title])).toEqual([
      ["18:30", "Low Water"],
      ["19:35", "The Ness Light"],
    ]);
    expect(JSON.stringify(own)).not.toMatch(/Dele|Wren/);
    const hanne = await readOwnSheet(await actorOf(world.people.accompanist.userId), issueId);
    expect(hanne.blocks).toHaveLength(4);
  });

  test("of what comes next, one's own sheet lists only the calls one is in", async () => {
    const [low] = callForm(world).blocks;
    const none = { leaderId: "", pianistId: "" };
    const { personId } = world.people.otherActor;
    await publishedCall({ ...none, localDate: "2027-04-08", blocks: [low] });
    await publishedCall({
      ...none,
      localDate: "2027-04-08",
      localTime: "20:30",
      leaderId: world.people.md.personId,
      blocks: [{ ...low, numberId: world.numbers[1] }],
      hand: [{ personId, act: "excuse", reason: "Costume fitting", keys: [] }],
    });
    as(world.people.stageManager.userId);
    const { issueId } = await issued();
    const nextOf = async (who: "actor" | "otherActor" | "md" | "accompanist") =>
      (await readOwnSheet(await actorOf(world.people[who].userId), issueId)).tomorrow;
    const first = "Thu 8 Apr, 18:30, music call, Room 1";
    const second = "Thu 8 Apr, 20:30, music call, Room 1";
    expect(await nextOf("actor")).toEqual([first]);
    expect(await nextOf("md")).toEqual([second]);
    // Excused from one and not in the other; neither plays nor leads in either.
    expect(await nextOf("otherActor")).toEqual([]);
    expect(await nextOf("accompanist")).toEqual([]);
    const manager = await actorOf(world.people.stageManager.userId);
    const { sheet } = await readIssue(manager, { productionId: world.productionId, issueId });
    expect(sheet.tomorrow).toEqual([first, second]);
  });

  test("an issue that kept nothing of what comes next for each person lists none of it", async () => {
    const { issueId } = await issued();
    const [row] = await db.select().from(t.callSheetIssues);
    const kept = row?.snapshot as {
      sheet: object;
      people: Record<string, { tomorrow?: string[] }>;
    };
    for (const part of Object.values(kept.people)) delete part.tomorrow;
    const snapshot = {
      ...kept,
      sheet: { ...kept.sheet, tomorrow: ["Thu 8 Apr, 18:30, music call"] },
    };
    await db.update(t.callSheetIssues).set({ snapshot });
    const wren = await actorOf(world.people.actor.userId);
    expect((await readOwnSheet(wren, issueId)).tomorrow).toEqual([]);
  });

  test("acknowledging is one's own, and the stage manager sees who has not", async () => {
    const { issueId } = await issued();
    as(world.people.actor.userId);
    expect(await acknowledgeSheet({ issueId })).toMatchObject({ ok: true });
    expect(await acknowledgeSheet({ issueId })).toMatchObject({ ok: true });
    const manager = await actorOf(world.people.stageManager.userId);
    const list = await listAcknowledgements(manager, { productionId: world.productionId, issueId });
    expect(list.map((row) => [row.name, row.at !== null])).toEqual([
      ["Dele Fashanu", false],
      ["Hanne Briscoe", false],
      ["Runa Oake", false],
      ["Wren Tallis", true],
    ]);
    const { days } = await listSheetDays(manager, world.productionId);
    expect(days).toMatchObject([
      { localDate, published: 1, drafts: 0, issues: [{ number: 1, concerns: 4, acknowledged: 1 }] },
    ]);
    await expect(
      listAcknowledgements(await actorOf(world.people.director.userId), {
        productionId: world.productionId,
        issueId,
      }),
    ).rejects.toMatchObject({ code: "not-allowed" });
  });

  test("someone it does not concern, and anyone of another production, finds nothing", async () => {
    const { issueId } = await issued();
    for (const person of [
      world.cover,
      world.people.siblingMd,
      world.people.outsiderMd,
      world.people.director,
    ]) {
      await expect(readOwnSheet(await actorOf(person.userId), issueId)).rejects.toMatchObject({
        code: "not-found",
      });
      as(person.userId);
      expect(await acknowledgeSheet({ issueId })).toMatchObject({
        ok: false,
        error: { code: "not-found" },
      });
    }
    for (const person of [world.people.siblingMd, world.people.outsiderMd]) {
      const actor = await actorOf(person.userId);
      await expect(
        readIssue(actor, { productionId: world.productionId, issueId }),
      ).rejects.toMatchObject({ code: "not-found" });
    }
    // Their own production, somebody else's issue.
    const sibling = await actorOf(world.people.siblingMd.userId);
    await expect(
      readIssue(sibling, { productionId: world.siblingProductionId, issueId }),
    ).rejects.toMatchObject({ code: "not-found" });
  });

  test("an ended position reads nothing any more", async () => {
    const { issueId } = await issued();
    await db
      .update(t.positions)
      .set({ endedAt: new Date() })
      .where(eq(t.positions.personId, world.people.actor.personId));
    expect(await listOwnSheets(await actorOf(world.people.actor.userId))).toEqual([]);
    await expect(
      readOwnSheet(await actorOf(world.people.actor.userId), issueId),
    ).rejects.toMatchObject({ code: "not-found" });
    await db
      .update(t.positions)
      .set({ endedAt: null })
      .where(eq(t.positions.personId, world.people.actor.personId));
  });

  test("only those who plan issue", async () => {
    const input = {
      productionId: world.productionId,
      localDate,
      seen: (await day()).seen,
      notes: "",
    };
    for (const person of [
      world.people.director,
      world.people.accompanist,
      world.people.actor,
      world.people.admin,
    ]) {
      as(person.userId);
      expect(await issueSheet(input)).toMatchObject({ ok: false, error: { code: "not-allowed" } });
    }
    for (const person of [world.people.siblingMd, world.people.outsiderMd]) {
      as(person.userId);
      expect(await issueSheet(input)).toMatchObject({ ok: false, error: { code: "not-found" } });
    }
    as(null);
    expect(await issueSheet(input)).toMatchObject({ ok: false, error: { code: "signed-out" } });
    as(world.people.assistant.userId);
    expect(await issueSheet(input)).toMatchObject({ ok: true });
  });
});
