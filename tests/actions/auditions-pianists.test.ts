import { eq } from "drizzle-orm";
import { beforeAll, describe, expect, test } from "vitest";
import {
  assignPianist,
  createDay,
  removeDay,
  removePianist,
} from "@/app/(season)/productions/[productionId]/auditions/actions";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import * as t from "@/db/schema";
import { as } from "../helpers/as";
import { auditionRoom, dayInput, makeDay } from "../helpers/audition-day";
import { makePerson, makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
let dayId: string;
let roomA: string;
let roomB: string;
beforeAll(async () => {
  world = await makeWorld();
  dayId = await makeDay(world, "2027-03-20");
  roomA = await auditionRoom(dayId, world.roomId);
  roomB = await auditionRoom(dayId, world.secondRoomId);
});

const assignment = (auditionRoomId: string, personId: string, from: string, to: string) => ({
  productionId: world.productionId,
  auditionRoomId,
  personId,
  from,
  to,
});

describe("pianists of a day", () => {
  test("change at lunch; one taken twice is refused with where and when, and what to do", async () => {
    as(world.people.md.userId);
    const hanne = world.people.accompanist;
    const osric = await makePerson(world.companyId, "Osric Dlamini", {
      kind: "accompanist",
      productionId: world.productionId,
    });
    const first = await assignPianist(assignment(roomA, hanne.personId, "10:00", "12:50"));
    expect(first).toMatchObject({ ok: true });
    expect(await assignPianist(assignment(roomA, osric.personId, "12:50", "16:00"))).toMatchObject({
      ok: true,
    });
    expect(await assignPianist(assignment(roomB, hanne.personId, "12:00", "16:00"))).toMatchObject({
      ok: false,
      error: {
        code: "taken",
        message:
          "Hanne Briscoe plays for The Tidewatcher in Room 1, 10:00–12:50. Choose another pianist, or times outside that (before 10:00 or from 12:50).",
      },
    });
    expect(await assignPianist(assignment(roomB, hanne.personId, "12:50", "16:00"))).toMatchObject({
      ok: true,
    });
    expect(await assignPianist(assignment(roomA, osric.personId, "12:00", "12:30"))).toMatchObject({
      ok: false,
      error: {
        code: "taken",
        message:
          "Hanne Briscoe plays in Room 1 10:00–12:50. Choose times outside that, or take that pianist out first.",
      },
    });
    expect(await assignPianist(assignment(roomB, osric.personId, "09:00", "12:00"))).toMatchObject({
      ok: false,
      error: {
        code: "invalid",
        fields: { from: "Room 2 is open 10:00–16:00. Choose times inside that." },
      },
    });
    if (!first.ok) return;
    expect(
      await removePianist({ productionId: world.productionId, sessionId: first.data.sessionId }),
    ).toMatchObject({ ok: true });
    expect(
      await removePianist({ productionId: world.productionId, sessionId: first.data.sessionId }),
    ).toMatchObject({ ok: false, error: { code: "not-found" } });
  });

  test("engaged by another company they are engaged elsewhere: no name of it is told", async () => {
    // One login with a record in each company: what the other company booked must not be readable here.
    const both = await makePerson(world.companyId, "Ada Twofold", {
      kind: "accompanist",
      productionId: world.productionId,
    });
    const otherRecord = newId();
    await db.insert(t.people).values({
      id: otherRecord,
      companyId: world.otherCompanyId,
      userId: both.userId,
      name: "Ada Twofold",
      email: both.email,
    });
    await db.insert(t.positions).values({
      companyId: world.otherCompanyId,
      personId: otherRecord,
      productionId: world.otherProductionId,
      kind: "accompanist",
    });
    as(world.people.outsiderMd.userId);
    const other = await createDay({
      ...dayInput(world, "2027-03-20", [world.otherRoomId]),
      productionId: world.otherProductionId,
    });
    if (!other.ok) throw new Error(other.error.message);
    const hall = await auditionRoom(other.data.dayId, world.otherRoomId);
    expect(
      await assignPianist({
        ...assignment(hall, otherRecord, "11:00", "13:00"),
        productionId: world.otherProductionId,
      }),
    ).toMatchObject({ ok: true });

    as(world.people.md.userId);
    const refused = await assignPianist(assignment(roomA, both.personId, "10:00", "12:00"));
    expect(refused).toMatchObject({
      ok: false,
      error: {
        code: "taken",
        message:
          "Ada Twofold is engaged elsewhere, 11:00–13:00. Choose another pianist, or times outside that (before 11:00 or from 13:00).",
      },
    });
    const told = JSON.stringify(refused);
    for (const secret of ["Candlemas", "Fenmoor", "Hall"]) expect(told).not.toContain(secret);
  });

  test("of ten assignments of one pianist at once, one stands", async () => {
    const eve = await makePerson(world.companyId, "Eve Single", {
      kind: "accompanist",
      productionId: world.productionId,
    });
    const day = await makeDay(world, "2027-05-01");
    const rooms = [
      await auditionRoom(day, world.roomId),
      await auditionRoom(day, world.secondRoomId),
    ];
    const results = await Promise.all(
      Array.from({ length: 10 }, (_, i) =>
        assignPianist(assignment(rooms[i % 2] ?? "", eve.personId, "10:00", "12:00")),
      ),
    );
    expect(results.filter((r) => r.ok)).toHaveLength(1);
    expect(results.filter((r) => !r.ok && r.error.code === "taken")).toHaveLength(9);
    expect(
      await db.select().from(t.pianistSessions).where(eq(t.pianistSessions.personId, eve.personId)),
    ).toHaveLength(1);
    expect(await removeDay({ productionId: world.productionId, dayId: day })).toMatchObject({
      ok: true,
    });
    expect(
      await db.select().from(t.pianistSessions).where(eq(t.pianistSessions.personId, eve.personId)),
    ).toEqual([]);
  });

  test("are assigned by the music team only, from the production's accompanists only", async () => {
    const p = world.people;
    const day = await makeDay(world, "2027-05-02", [world.roomId]);
    const room = await auditionRoom(day, world.roomId);
    for (const person of [p.stageManager, p.director, p.accompanist, p.actor, p.admin]) {
      as(person.userId);
      expect(
        await assignPianist(assignment(room, p.accompanist.personId, "10:00", "11:00")),
        person.name,
      ).toMatchObject({ ok: false, error: { code: "not-allowed" } });
    }
    as(p.outsiderMd.userId);
    expect(
      await assignPianist(assignment(room, p.accompanist.personId, "10:00", "11:00")),
    ).toMatchObject({ ok: false, error: { code: "not-found" } });
    as(p.assistant.userId);
    expect(await assignPianist(assignment(room, p.actor.personId, "10:00", "11:00"))).toMatchObject(
      { ok: false, error: { code: "not-found" } },
    );
    expect(
      await assignPianist(assignment(room, p.accompanist.personId, "11:00", "10:00")),
    ).toMatchObject({ ok: false, error: { code: "invalid" } });
  });
});
