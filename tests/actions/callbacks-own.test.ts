import { and, eq } from "drizzle-orm";
import { beforeEach, describe, expect, test } from "vitest";
import { answerCallback } from "@/app/(me)/actions";
import {
  publishRound,
  startRound,
} from "@/app/(season)/productions/[productionId]/callbacks/actions";
import { computeFit } from "@/app/(season)/productions/[productionId]/casting/actions";
import { db } from "@/db/client";
import { callbackInvitations, callbackRounds, positions, productions, ranges } from "@/db/schema";
import { listOwnCallbacks } from "@/lib/data/callbacks/own";
import { readTrail } from "@/lib/data/trail";
import { actorOf } from "../helpers/actor-of";
import { as } from "../helpers/as";
import { makeCallbackRound } from "../helpers/callback-round";
import { makePerson, makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
let round: Awaited<ReturnType<typeof makeCallbackRound>>;

beforeEach(async () => {
  world = await makeWorld();
  round = await makeCallbackRound(world);
});

async function calledBack(): Promise<string> {
  as(world.people.md.userId);
  const { productionId } = world;
  expect(await publishRound({ productionId, roundId: round.roundId, version: 1 })).toMatchObject({
    ok: true,
  });
  const [own] = await listOwnCallbacks(await actorOf(world.people.actor.userId));
  return own?.invitationId ?? "";
}

const answerOf = async (id: string) =>
  (
    await db
      .select({ answer: callbackInvitations.answer })
      .from(callbackInvitations)
      .where(eq(callbackInvitations.id, id))
  )[0]?.answer;

describe("a callback", () => {
  test("is nobody's any more once their position has ended", async () => {
    const invitationId = await calledBack();
    const { actor } = world.people;
    await db
      .update(positions)
      .set({ endedAt: new Date() })
      .where(and(eq(positions.personId, actor.personId), eq(positions.kind, "actor")));
    expect(await listOwnCallbacks(await actorOf(actor.userId))).toEqual([]);
    as(actor.userId);
    expect(await answerCallback({ invitationId, answer: "yes" })).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
    expect(await answerOf(invitationId)).toBeNull();
  });

  test("of a production that was removed is not answered", async () => {
    const invitationId = await calledBack();
    await db
      .update(productions)
      .set({ removedAt: new Date() })
      .where(eq(productions.id, world.productionId));
    as(world.people.actor.userId);
    expect(await answerCallback({ invitationId, answer: "no" })).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
  });

  test("that the list has moved past keeps the answer it had", async () => {
    const invitationId = await calledBack();
    await db
      .update(callbackInvitations)
      .set({ supersededAt: new Date() })
      .where(eq(callbackInvitations.id, invitationId));
    as(world.people.actor.userId);
    expect(await answerCallback({ invitationId, answer: "yes" })).toMatchObject({
      ok: false,
      error: { code: "stale" },
    });
    expect(await answerOf(invitationId)).toBeNull();
  });
});

test("who was called back is kept from the company's admin, in the trail too", async () => {
  const invitationId = await calledBack();
  as(world.people.actor.userId);
  expect(await answerCallback({ invitationId, answer: "yes" })).toMatchObject({ ok: true });
  const told = async (who: "md" | "admin") =>
    (
      await readTrail(await actorOf(world.people[who].userId), { companyId: world.companyId })
    ).events.filter((event) => event.what.startsWith("Answered a callback"));
  expect(await told("md")).toHaveLength(1);
  expect(await told("admin")).toEqual([]);
});

test("ten people beginning a round at once begin one", async () => {
  const { productionId } = world;
  await calledBack();
  const begun = await Promise.all(
    Array.from({ length: 10 }, () => startRound({ productionId, title: "Second callbacks" })),
  );
  expect(begun.filter((answer) => answer.ok)).toHaveLength(1);
  expect(await db.$count(callbackRounds, eq(callbackRounds.productionId, productionId))).toBe(2);
});

test("the fit of somebody who sings for another production of the company only is not given", async () => {
  const { companyId, siblingProductionId, productionId } = world;
  const sibling = await makePerson(companyId, "Ottilie Brand", {
    kind: "actor",
    productionId: siblingProductionId,
  });
  await db.insert(ranges).values({
    personId: sibling.personId,
    kind: "heard",
    low: 55,
    high: 79,
    productionId: siblingProductionId,
  });
  as(world.people.director.userId);
  expect(
    await computeFit({ productionId, roleId: round.maren, personId: sibling.personId }),
  ).toMatchObject({ ok: false, error: { code: "not-found" } });
});
