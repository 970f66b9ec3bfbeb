import { eq } from "drizzle-orm";
import { beforeAll, beforeEach, describe, expect, test } from "vitest";
import {
  cancelCall,
  changeCall,
  createCall,
  publishCall,
  restoreCall,
} from "@/app/(season)/productions/[productionId]/rehearsals/actions";
import { db } from "@/db/client";
import * as t from "@/db/schema";
import { listCallsOfWeek } from "@/lib/data/calls/list";
import { as } from "../helpers/as";
import { actorOf, addConflict, callForm, makeRehearsalWorld } from "../helpers/rehearsal-world";
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

const bookings = () => db.select().from(t.roomBookings);
const sessions = () => db.select().from(t.pianistSessions);
const seen = (callId: string, version: number) => ({
  productionId: world.productionId,
  callId,
  version,
});

describe("publishing", () => {
  test("takes the room and the pianist; cancelling frees them; undo takes them again while they are free", async () => {
    const callId = await published();
    expect(await bookings()).toMatchObject([
      {
        callId,
        roomId: world.roomId,
        startsAt: new Date("2027-04-06T17:30:00Z"),
        endsAt: new Date("2027-04-06T19:00:00Z"),
      },
    ]);
    expect(await sessions()).toMatchObject([{ callId, bookeeId: world.people.accompanist.userId }]);
    expect(await cancelCall(seen(callId, 2))).toEqual({
      ok: true,
      data: { was: "published", version: 3 },
    });
    expect([await bookings(), await sessions()]).toEqual([[], []]);
    expect(await restoreCall({ ...seen(callId, 3), to: "published" })).toMatchObject({ ok: true });
    expect(await bookings()).toHaveLength(1);
    await cancelCall(seen(callId, 4));
    await published({ pianistId: "", leaderId: "" });
    expect(await restoreCall({ ...seen(callId, 5), to: "published" })).toMatchObject({
      ok: false,
      error: {
        code: "taken",
        message:
          "Room 1 is taken by a music call of The Tidewatcher, 18:30–20:00. Choose another room, or a time outside that.",
      },
    });
    expect(await restoreCall({ ...seen(callId, 5), to: "draft" })).toMatchObject({ ok: true });
  });

  test("a draft may hold a clash; people's clashes are asked about once and do not stand in the way", async () => {
    await addConflict(
      world.people.actor.personId,
      "2027-04-06T16:30:00Z",
      "2027-04-06T17:45:00Z",
      "agreed",
    );
    const callId = await made();
    const week = await listCallsOfWeek(await actorOf(world.people.md.userId), {
      productionId: world.productionId,
      monday: "2027-04-05",
    });
    expect(week.calls).toMatchObject([{ id: callId, state: "draft", clashes: 1, people: 2 }]);
    expect(await publishCall(seen(callId, 1))).toEqual({
      ok: true,
      data: {
        published: false,
        ask: ["Wren Tallis cannot come 17:30–18:45 (Evening class), agreed: 15 min of this call"],
      },
    });
    expect(await bookings()).toEqual([]);
    expect(await publishCall({ ...seen(callId, 1), despite: true })).toEqual({
      ok: true,
      data: { published: true },
    });
  });

  test("twenty calls into one room at once: exactly one gets it", async () => {
    const ids = [];
    for (let n = 0; n < 20; n += 1)
      ids.push(await made({ pianistId: "", leaderId: "", localTime: `18:${String(30 + n)}` }));
    const results = await Promise.all(
      ids.map((callId) => publishCall({ ...seen(callId, 1), despite: true })),
    );
    expect(results.filter((result) => result.ok)).toHaveLength(1);
    expect(
      results.filter((result) => !result.ok).map((result) => !result.ok && result.error.code),
    ).toEqual(Array.from({ length: 19 }, () => "taken"));
    expect(await bookings()).toHaveLength(1);
    const states = await db
      .select({ state: t.calls.state })
      .from(t.calls)
      .where(eq(t.calls.state, "published"));
    expect(states).toHaveLength(1);
  });

  test("one pianist for two rooms at once: the second is refused with where and when", async () => {
    const [first, second] = [
      await made({ leaderId: "" }),
      await made({ leaderId: "", roomId: world.secondRoomId }),
    ];
    const results = await Promise.all(
      [first, second].map((callId) => publishCall({ ...seen(callId, 1), despite: true })),
    );
    const refused = results.find((result) => !result.ok);
    expect(results.filter((result) => result.ok)).toHaveLength(1);
    expect(refused).toMatchObject({ ok: false, error: { code: "taken" } });
    expect(refused && !refused.ok && refused.error.message).toMatch(
      /^Hanne Briscoe plays for The Tidewatcher in Room [12], 18:30–20:00\. Choose another pianist/,
    );
    expect([await bookings(), await sessions()].map((rows) => rows.length)).toEqual([1, 1]);
  });

  test("a published call that changes takes its new time, or nothing changes at all", async () => {
    const callId = await published();
    const blocking = await published({
      localTime: "21:00",
      pianistId: "",
      leaderId: "",
      blocks: [{ ...callForm(world).blocks[0], kind: "scene", numberId: "", title: "Storm" }],
    });
    const form = { ...callForm(world), callId };
    expect(await changeCall({ ...form, version: 2, localTime: "20:00" })).toMatchObject({
      ok: false,
      error: { code: "taken" },
    });
    expect(await bookings()).toHaveLength(2);
    expect((await db.select().from(t.calls).where(eq(t.calls.id, callId)))[0]).toMatchObject({
      localTime: "18:30",
      version: 2,
    });
    expect(await changeCall({ ...form, version: 2, localTime: "19:30" })).toMatchObject({
      ok: true,
    });
    expect((await bookings()).find((row) => row.callId === callId)?.startsAt).toEqual(
      new Date("2027-04-06T18:30:00Z"),
    );
    expect((await sessions())[0]?.startsAt).toEqual(new Date("2027-04-06T18:30:00Z"));
    expect(blocking).not.toBe(callId);
    expect(await changeCall({ ...form, version: 2 })).toMatchObject({
      ok: false,
      error: { code: "stale" },
    });
    expect(await publishCall(seen(callId, 2))).toMatchObject({
      ok: false,
      error: { code: "stale" },
    });
  });
});
