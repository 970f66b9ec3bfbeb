import { eq } from "drizzle-orm";
import { beforeEach, describe, expect, test } from "vitest";
import {
  changeRound,
  publishRound,
  setMark,
  startRound,
} from "@/app/(season)/productions/[productionId]/callbacks/actions";
import {
  choose,
  computeFit,
  publishCast,
} from "@/app/(season)/productions/[productionId]/casting/actions";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import * as t from "@/db/schema";
import { loadActor } from "@/lib/data/actor";
import { answerCallback, listOwnCallbacks } from "@/lib/data/callbacks/own";
import { readCallbacks } from "@/lib/data/callbacks/draft";
import { readCastingGrid } from "@/lib/data/casting/grid";
import { as } from "../helpers/as";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
let maren: string;
let bet: string;

const md = () => as(world.people.md.userId);
async function actorOf(userId: string) {
  const actor = await loadActor(userId);
  if (!actor) throw new Error("no such login");
  return actor;
}

beforeEach(async () => {
  world = await makeWorld();
  maren = newId();
  bet = newId();
  const numberId = newId();
  await db.insert(t.roles).values([
    { id: maren, productionId: world.productionId, name: "Maren", place: 1 },
    { id: bet, productionId: world.productionId, name: "Old Bet", place: 2 },
  ]);
  await db.insert(t.numbers).values({
    id: numberId,
    productionId: world.productionId,
    label: "1",
    title: "The Ness Light",
    place: 1,
  });
  // Maren sings B♭3 to A5 (MIDI 58–81), as in the design's casting grid.
  await db.insert(t.vocalLines).values({
    roleId: maren,
    numberId,
    source: "typed",
    low: 58,
    high: 81,
    lowSpelled: "B♭3",
    highSpelled: "A5",
    histogram: { "58": 1, "65": 30, "70": 30, "76": 20, "80": 1, "81": 1 },
  });
  for (const [index, person] of [world.people.actor, world.people.otherActor].entries()) {
    await db
      .insert(t.signUps)
      .values({ productionId: world.productionId, personId: person.personId, place: index + 1 });
  }
  // Wren Tallis: G3–G5 (55–79).
  await db
    .insert(t.ranges)
    .values({ personId: world.people.actor.personId, kind: "claimed", low: 55, high: 79 });
});

async function begin() {
  md();
  const started = await startRound({ productionId: world.productionId, title: "Callbacks" });
  if (!started.ok) throw new Error(started.error.message);
  return started.data.roundId;
}
const when = (roundId: string, version: number, roomId = world.roomId) =>
  changeRound({
    productionId: world.productionId,
    roundId,
    version,
    localDate: "2027-03-23",
    from: "18:00",
    to: "21:00",
    roomId,
    material: "The Ness Light, bars 45–76",
  });
const mark = (roundId: string, person: { personId: string }, roleId: string, on = true) =>
  setMark({ productionId: world.productionId, roundId, personId: person.personId, roleId, on });

describe("callbacks", () => {
  test("an actor sees nothing before the list is published, then only their own, and answers", async () => {
    const roundId = await begin();
    expect((await when(roundId, 1)).ok).toBe(true);
    await mark(roundId, world.people.actor, maren);
    await mark(roundId, world.people.otherActor, bet);
    const wren = await actorOf(world.people.actor.userId);
    expect(await listOwnCallbacks(wren)).toEqual([]);
    expect(await publishRound({ productionId: world.productionId, roundId, version: 2 })).toEqual({
      ok: true,
      data: { told: 2, unchanged: 0, takenOff: 0 },
    });
    const own = await listOwnCallbacks(wren);
    expect(own).toHaveLength(1);
    expect(own[0]).toMatchObject({
      production: "The Tidewatcher",
      roles: ["Maren"],
      room: "Room 1, Lantern Street",
      material: "The Ness Light, bars 45–76",
      answer: null,
    });
    const invitationId = own[0]?.invitationId ?? "";
    await answerCallback(wren, { invitationId, answer: "yes" });
    expect((await listOwnCallbacks(wren))[0]?.answer).toBe("yes");
    await expect(
      answerCallback(await actorOf(world.people.otherActor.userId), { invitationId, answer: "no" }),
    ).rejects.toMatchObject({ code: "not-found" });
    const mails = await db
      .select({ to: t.outbox.toEmail })
      .from(t.outbox)
      .where(eq(t.outbox.template, "callback"));
    expect(mails.map((m) => m.to).sort()).toEqual(
      [world.people.actor.email, world.people.otherActor.email].sort(),
    );
  });

  test("publishing again tells only those it changes, and takes off those no longer marked", async () => {
    const roundId = await begin();
    await when(roundId, 1);
    await mark(roundId, world.people.actor, maren);
    await mark(roundId, world.people.otherActor, bet);
    await publishRound({ productionId: world.productionId, roundId, version: 2 });
    await mark(roundId, world.people.actor, bet);
    await mark(roundId, world.people.otherActor, bet, false);
    expect(await publishRound({ productionId: world.productionId, roundId, version: 3 })).toEqual({
      ok: true,
      data: { told: 1, unchanged: 0, takenOff: 1 },
    });
    expect((await listOwnCallbacks(await actorOf(world.people.actor.userId)))[0]?.roles).toEqual([
      "Maren",
      "Old Bet",
    ]);
    expect(await listOwnCallbacks(await actorOf(world.people.otherActor.userId))).toEqual([]);
    // The first issue is still there as it was: it is followed, never altered.
    const first = await db
      .select({ snapshot: t.callbackInvitations.snapshot })
      .from(t.callbackInvitations)
      .where(eq(t.callbackInvitations.issue, 1));
    expect(first.map((row) => row.snapshot.roles)).toContainEqual(["Maren"]);
  });

  test("without a time, with nobody marked, or on stale ground nothing goes out", async () => {
    const roundId = await begin();
    expect(
      await publishRound({ productionId: world.productionId, roundId, version: 1 }),
    ).toMatchObject({ ok: false, error: { code: "refused" } });
    await when(roundId, 1);
    expect(
      await publishRound({ productionId: world.productionId, roundId, version: 2 }),
    ).toMatchObject({ ok: false, error: { code: "refused" } });
    await mark(roundId, world.people.actor, maren);
    expect(
      await publishRound({ productionId: world.productionId, roundId, version: 1 }),
    ).toMatchObject({ ok: false, error: { code: "stale" } });
    expect(await db.select().from(t.callbackInvitations)).toEqual([]);
    expect(await when(roundId, 1)).toMatchObject({ ok: false, error: { code: "stale" } });
  });

  test("a room that is taken then is refused, and nothing goes out", async () => {
    const callId = newId();
    await db.insert(t.calls).values({
      id: callId,
      productionId: world.siblingProductionId,
      kind: "music",
      startsAt: new Date("2027-03-23T17:00:00Z"),
      endsAt: new Date("2027-03-23T18:30:00Z"),
      localDate: "2027-03-23",
      localTime: "17:00",
      zone: "Europe/London",
      roomId: world.roomId,
      state: "published",
    });
    await db.insert(t.roomBookings).values({
      roomId: world.roomId,
      startsAt: new Date("2027-03-23T17:00:00Z"),
      endsAt: new Date("2027-03-23T18:30:00Z"),
      callId,
    });
    const roundId = await begin();
    await when(roundId, 1);
    await mark(roundId, world.people.actor, maren);
    expect(
      await publishRound({ productionId: world.productionId, roundId, version: 2 }),
    ).toMatchObject({ ok: false, error: { code: "taken" } });
    expect(await listOwnCallbacks(await actorOf(world.people.actor.userId))).toEqual([]);
    await when(roundId, 2, world.secondRoomId);
    expect((await publishRound({ productionId: world.productionId, roundId, version: 3 })).ok).toBe(
      true,
    );
  });

  test("the table marks but does not publish; the stage manager reads; others may neither", async () => {
    const roundId = await begin();
    as(world.people.director.userId);
    expect((await mark(roundId, world.people.actor, maren)).ok).toBe(true);
    expect(
      await publishRound({ productionId: world.productionId, roundId, version: 1 }),
    ).toMatchObject({ ok: false, error: { code: "not-allowed" } });
    as(world.people.stageManager.userId);
    expect(await mark(roundId, world.people.actor, bet)).toMatchObject({
      ok: false,
      error: { code: "not-allowed" },
    });
    expect(
      (await readCallbacks(await actorOf(world.people.stageManager.userId), world.productionId))
        .may,
    ).toEqual({ mark: false, publish: false });
    for (const who of [world.people.actor, world.people.accompanist]) {
      await expect(
        readCallbacks(await actorOf(who.userId), world.productionId),
      ).rejects.toMatchObject({ code: "not-allowed" });
    }
    as(world.people.outsiderMd.userId);
    expect(await mark(roundId, world.people.actor, maren)).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
    md();
    expect(
      await setMark({
        productionId: world.productionId,
        roundId,
        personId: world.people.outsiderMd.personId,
        roleId: maren,
        on: true,
      }),
    ).toMatchObject({ ok: false, error: { code: "not-found" } });
  });
});

describe("the casting grid", () => {
  const cast = (
    person: { personId: string },
    roleId: string,
    version: number,
    extra: object = {},
  ) =>
    choose({
      productionId: world.productionId,
      roleId,
      personId: person.personId,
      state: "cast",
      version,
      ...extra,
    });

  test("shows the called-back singer against each role with the verdict in words", async () => {
    const roundId = await begin();
    await mark(roundId, world.people.actor, maren);
    const grid = await readCastingGrid(await actorOf(world.people.md.userId), world.productionId);
    expect(grid.singers.map((s) => s.name)).toEqual(["Wren Tallis"]);
    // G3–G5 against B♭3–A5: two semitones missing at the top, none below (counted by hand).
    expect(grid.singers[0]?.cells[maren]).toEqual({
      verdict: "stretch",
      words: "2 short at top",
      choice: null,
    });
    expect(grid.singers[0]?.cells[bet]).toMatchObject({
      verdict: null,
      words: "Role has no line yet",
    });
  });

  test("the server action computes the fit number by number", async () => {
    md();
    const fit = await computeFit({
      productionId: world.productionId,
      roleId: maren,
      personId: world.people.actor.personId,
    });
    expect(fit).toMatchObject({
      ok: true,
      data: {
        whole: { shortAbove: 2, shortBelow: 0 },
        numbers: [{ title: "The Ness Light", words: "2 short at top" }],
      },
    });
    as(world.people.actor.userId);
    expect(
      await computeFit({
        productionId: world.productionId,
        roleId: maren,
        personId: world.people.actor.personId,
      }),
    ).toMatchObject({ ok: false, error: { code: "not-allowed" } });
  });

  test("a heard range beats a claimed one", async () => {
    await db.insert(t.ranges).values({
      personId: world.people.actor.personId,
      kind: "heard",
      low: 55,
      high: 82,
      productionId: world.productionId,
    });
    md();
    expect(
      await computeFit({
        productionId: world.productionId,
        roleId: maren,
        personId: world.people.actor.personId,
      }),
    ).toMatchObject({ ok: true, data: { whole: { shortAbove: 0 } } });
  });

  test("two people casting one part at once: one does, the other is told who has it", async () => {
    as(world.people.md.userId);
    const results = await Promise.all([
      cast(world.people.actor, maren, 0),
      cast(world.people.otherActor, maren, 0),
    ]);
    expect(results.filter((r) => r.ok)).toHaveLength(1);
    expect(results.find((r) => !r.ok)).toMatchObject({ error: { code: "taken" } });
    expect(await db.select().from(t.choices).where(eq(t.choices.roleId, maren))).toHaveLength(1);
  });

  test("a change on stale ground is refused; taking back works; a cover may stand beside a principal", async () => {
    md();
    expect((await cast(world.people.actor, maren, 0)).ok).toBe(true);
    expect(await cast(world.people.actor, maren, 0)).toMatchObject({
      ok: false,
      error: { code: "stale" },
    });
    expect((await cast(world.people.otherActor, maren, 0, { kind: "cover" })).ok).toBe(true);
    expect(
      (
        await choose({
          productionId: world.productionId,
          roleId: maren,
          personId: world.people.actor.personId,
          state: "none",
          version: 1,
        })
      ).ok,
    ).toBe(true);
    expect(await db.select({ kind: t.choices.kind }).from(t.choices)).toEqual([{ kind: "cover" }]);
  });

  test("the stage manager sees the grid once the cast is out; actors and the table do not choose", async () => {
    await expect(
      readCastingGrid(await actorOf(world.people.stageManager.userId), world.productionId),
    ).rejects.toMatchObject({ code: "not-allowed" });
    md();
    expect(await publishCast({ productionId: world.productionId, published: true })).toMatchObject({
      ok: false,
      error: { code: "refused" },
    });
    await cast(world.people.actor, maren, 0);
    expect((await publishCast({ productionId: world.productionId, published: true })).ok).toBe(
      true,
    );
    const seen = await readCastingGrid(
      await actorOf(world.people.stageManager.userId),
      world.productionId,
    );
    expect(seen.mayChoose).toBe(false);
    as(world.people.director.userId);
    expect(await cast(world.people.actor, bet, 0)).toMatchObject({
      ok: false,
      error: { code: "not-allowed" },
    });
    as(world.people.actor.userId);
    expect(await cast(world.people.actor, bet, 0)).toMatchObject({
      ok: false,
      error: { code: "not-allowed" },
    });
    as(null);
    expect(await cast(world.people.actor, bet, 0)).toMatchObject({
      ok: false,
      error: { code: "signed-out" },
    });
  });
});
