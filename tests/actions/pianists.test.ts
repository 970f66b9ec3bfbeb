import { eq } from "drizzle-orm";
import { beforeAll, beforeEach, describe, expect, test } from "vitest";
import { assignCallPianist } from "@/app/(season)/productions/[productionId]/pianists/actions";
import {
  createCall,
  publishCall,
} from "@/app/(season)/productions/[productionId]/rehearsals/actions";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import * as t from "@/db/schema";
import { listOwnSessions } from "@/lib/data/pianists/own";
import { listSessions } from "@/lib/data/pianists/sessions";
import { as } from "../helpers/as";
import { actorOf, callForm, makeRehearsalWorld } from "../helpers/rehearsal-world";
import type { RehearsalWorld } from "../helpers/rehearsal-world";

let world: RehearsalWorld;
beforeAll(async () => {
  world = await makeRehearsalWorld();
  await db
    .update(t.people)
    .set({ phone: "0000 555 014" })
    .where(eq(t.people.id, world.people.stageManager.personId));
});
beforeEach(async () => {
  await db.delete(t.pianistSessions);
  await db.delete(t.roomBookings);
  await db.delete(t.calls);
  as(world.people.md.userId);
});

async function published(change: Record<string, unknown> = {}): Promise<string> {
  as(world.people.md.userId);
  const made = await createCall(callForm(world, change));
  if (!made.ok) throw new Error(JSON.stringify(made.error));
  const result = await publishCall({
    productionId: world.productionId,
    callId: made.data.callId,
    version: 1,
    despite: true,
  });
  if (!result.ok) throw new Error(JSON.stringify(result.error));
  return made.data.callId;
}

const after = new Date("2027-01-01T00:00:00Z");
const plan = async () =>
  listSessions(await actorOf(world.people.md.userId), {
    productionId: world.productionId,
    since: "2027-01-01",
  });

/** An audition room 10:00 to 12:00 London time (GMT in March) with a rest and one singer, played until 11:00. */
async function auditionRoom(): Promise<void> {
  const dayId = newId();
  const auditionRoomId = newId();
  const slotId = newId();
  const signUpId = newId();
  const at = (time: string) => new Date(`2027-03-20T${time}:00Z`);
  await db.insert(t.auditionDays).values({
    id: dayId,
    productionId: world.productionId,
    localDate: "2027-03-20",
    zone: "Europe/London",
    slotMinutes: 8,
  });
  await db.insert(t.auditionRooms).values({
    id: auditionRoomId,
    dayId,
    roomId: world.roomId,
    opensAt: at("10:00"),
    closesAt: at("12:00"),
  });
  await db.insert(t.slots).values([
    { id: slotId, auditionRoomId, kind: "slot", startsAt: at("10:00"), endsAt: at("10:08") },
    { auditionRoomId, kind: "rest", startsAt: at("10:08"), endsAt: at("10:18") },
  ]);
  await db.insert(t.signUps).values({
    id: signUpId,
    productionId: world.productionId,
    personId: world.cover.personId,
    place: 1,
    state: "confirmed",
    song: "Fairy Lullaby",
    bars: 16,
  });
  await db.insert(t.slotAssignments).values({ slotId, signUpId, dayId });
  await db.insert(t.pianistSessions).values({
    productionId: world.productionId,
    personId: world.people.accompanist.personId,
    bookeeId: world.people.accompanist.userId,
    auditionRoomId,
    startsAt: at("10:00"),
    endsAt: at("11:00"),
  });
}

describe("the pianists of a production", () => {
  test("sessions by day, who plays, what is missing, and each one's load", async () => {
    await auditionRoom();
    const callId = await published();
    await published({ localTime: "21:00", pianistId: "" });
    const { days } = await plan();
    expect(days.map((day) => day.localDate)).toEqual(["2027-03-20", "2027-04-06"]);
    expect(days[0]?.sessions[0]).toMatchObject({
      title: "Auditions",
      room: "Room 1",
      gaps: [{ from: new Date("2027-03-20T11:00:00Z"), to: new Date("2027-03-20T12:00:00Z") }],
    });
    expect(
      days[1]?.sessions.map((session) => [
        session.callId === callId,
        session.played.map((played) => played.name),
        session.gaps.length,
      ]),
    ).toEqual([
      [true, ["Hanne Briscoe"], 0],
      [false, [], 1],
    ]);
    expect(days[1]?.loads).toMatchObject([{ name: "Hanne Briscoe", minutes: 90 }]);
    await db.delete(t.pianistSessions);
    await db.delete(t.slotAssignments);
    await db.delete(t.auditionRooms);
    await db.delete(t.auditionDays);
    await db.delete(t.signUps);
  });

  test("assigning for a published call holds the pianist at once; taken twice is refused", async () => {
    await published();
    const callId = await published({ roomId: world.secondRoomId, pianistId: "", leaderId: "" });
    const input = {
      productionId: world.productionId,
      callId,
      version: 2,
      personId: world.people.accompanist.personId,
    };
    expect(await assignCallPianist(input)).toMatchObject({
      ok: false,
      error: {
        code: "taken",
        message: expect.stringMatching(
          /^Hanne Briscoe plays for The Tidewatcher in Room 1, 18:30–20:00\./,
        ) as unknown,
      },
    });
    expect(
      await assignCallPianist({ ...input, personId: world.secondPianist.personId }),
    ).toMatchObject({ ok: true });
    expect(await assignCallPianist(input)).toMatchObject({ ok: false, error: { code: "stale" } });
    expect(
      await db.select().from(t.pianistSessions).where(eq(t.pianistSessions.callId, callId)),
    ).toMatchObject([{ personId: world.secondPianist.personId }]);
    expect(await assignCallPianist({ ...input, version: 3, personId: "" })).toMatchObject({
      ok: true,
    });
    expect(
      await db.select().from(t.pianistSessions).where(eq(t.pianistSessions.callId, callId)),
    ).toEqual([]);
  });

  test("one pianist for twenty calls at once is held once", async () => {
    const ids: string[] = [];
    for (let n = 0; n < 20; n += 1)
      ids.push(await published({ roomId: "", pianistId: "", leaderId: "" }));
    const results = await Promise.all(
      ids.map((callId) =>
        assignCallPianist({
          productionId: world.productionId,
          callId,
          version: 2,
          personId: world.people.accompanist.personId,
        }),
      ),
    );
    expect(results.filter((result) => result.ok)).toHaveLength(1);
    expect(await db.select().from(t.pianistSessions)).toHaveLength(1);
  });

  test("the music team assigns; the stage manager sees; nobody else", async () => {
    const callId = await published({ pianistId: "" });
    const input = {
      productionId: world.productionId,
      callId,
      version: 2,
      personId: world.people.accompanist.personId,
    };
    const { people } = world;
    for (const person of [
      people.stageManager,
      people.director,
      people.accompanist,
      people.actor,
      people.admin,
    ]) {
      as(person.userId);
      expect(await assignCallPianist(input)).toMatchObject({
        ok: false,
        error: { code: "not-allowed" },
      });
    }
    for (const person of [people.siblingMd, people.outsiderMd]) {
      as(person.userId);
      expect(await assignCallPianist(input)).toMatchObject({
        ok: false,
        error: { code: "not-found" },
      });
      expect(
        await assignCallPianist({
          ...input,
          productionId:
            person === people.siblingMd ? world.siblingProductionId : world.otherProductionId,
          personId: "",
        }),
      ).toMatchObject({ ok: false, error: { code: "not-found" } });
    }
    as(null);
    expect(await assignCallPianist(input)).toMatchObject({
      ok: false,
      error: { code: "signed-out" },
    });
    expect(
      (
        await listSessions(await actorOf(people.stageManager.userId), {
          productionId: world.productionId,
          since: "2027-01-01",
        })
      ).mayAssign,
    ).toBe(false);
    await expect(
      listSessions(await actorOf(people.director.userId), {
        productionId: world.productionId,
        since: "2027-01-01",
      }),
    ).rejects.toMatchObject({ code: "not-allowed" });
    as(people.assistant.userId);
    expect(await assignCallPianist(input)).toMatchObject({ ok: true });
  });
});

describe("an accompanist's own sessions", () => {
  test("only theirs, in order, with room, people, music, rests and whom to ring", async () => {
    await auditionRoom();
    const blocks = [...callForm(world).blocks];
    blocks.splice(1, 0, {
      ...blocks[0]!,
      key: "pause",
      kind: "break" as never,
      numberId: "",
      minutes: 15,
    });
    await published({ blocks });
    const sessions = await listOwnSessions(await actorOf(world.people.accompanist.userId), {
      after,
    });
    expect(sessions).toMatchObject([
      {
        what: "Auditions",
        room: "Room 1",
        address: "4 Quay Lane",
        music: [{ title: "Fairy Lullaby", bars: "16 bars", people: ["Imke Dorne"] }],
        rests: [{ from: new Date("2027-03-20T10:08:00Z") }],
      },
      {
        what: "Music call",
        production: "The Tidewatcher",
        music: [
          { label: "1", title: "Low Water", key: "G", tempo: 96, people: ["Wren Tallis"] },
          { label: "2", people: ["Dele Fashanu"] },
          { label: "3", people: ["Dele Fashanu", "Wren Tallis"] },
        ],
        rests: [{ from: new Date("2027-04-06T18:00:00Z"), to: new Date("2027-04-06T18:15:00Z") }],
        contacts: [
          { name: "Runa Oake", phone: null },
          { name: "Bram Teller", phone: "0000 555 014" },
        ],
      },
    ]);
    // Nobody's address, and nothing about who is cast as what.
    expect(JSON.stringify(sessions)).not.toMatch(/@|Maren|Pip/);
    for (const person of [world.secondPianist, world.people.actor, world.people.outsiderMd]) {
      expect(await listOwnSessions(await actorOf(person.userId), { after })).toEqual([]);
    }
  });
});
