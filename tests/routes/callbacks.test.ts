import { beforeEach, describe, expect, test } from "vitest";
import { GET } from "@/app/api/productions/[productionId]/callbacks/route";
import { publishRound, setMark } from "@/app/(season)/productions/[productionId]/callbacks/actions";
import { withdrawSignUp } from "@/app/(season)/productions/[productionId]/auditions/actions";
import { db } from "@/db/client";
import * as t from "@/db/schema";
import type { Draft } from "@/lib/client/callbacks";
import { loadActor } from "@/lib/data/actor";
import { roomsOfProduction } from "@/lib/data/rooms";
import { eq } from "drizzle-orm";
import { as } from "../helpers/as";
import { makeCallbackRound } from "../helpers/callback-round";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
let round: Awaited<ReturnType<typeof makeCallbackRound>>;
beforeEach(async () => {
  world = await makeWorld();
  round = await makeCallbackRound(world);
});

const ask = (productionId = world.productionId) =>
  GET(new Request(`http://localhost:3000/api/productions/${productionId}/callbacks`), {
    params: Promise.resolve({ productionId }),
  });
async function draftFor(userId: string): Promise<Draft> {
  as(userId);
  const response = await ask();
  expect(response.status).toBe(200);
  return (await response.json()) as Draft;
}
const mark = (person: { personId: string }, roleId: string, on: boolean) =>
  setMark({
    productionId: world.productionId,
    roundId: round.roundId,
    personId: person.personId,
    roleId,
    on,
  });

describe("GET callbacks", () => {
  test("gives the draft with the verdict on each role in the order of the roles", async () => {
    const draft = await draftFor(world.people.md.userId);
    expect(draft.roles).toEqual([
      { id: round.maren, name: "Maren", line: { low: 58, high: 81 } },
      { id: round.bet, name: "Old Bet", line: null },
    ]);
    // G3–G5 against B♭3–A5: two semitones missing at the top (counted by hand).
    expect(draft.singers[0]).toMatchObject({
      name: "Wren Tallis",
      range: { low: 55, high: 79, kind: "claimed" },
      marks: [round.maren],
      fits: [
        { verdict: "stretch", words: "2 short at top" },
        { verdict: null, words: "Role has no line yet" },
      ],
      sent: null,
      unsent: "new",
    });
    expect(draft.singers[1]).toMatchObject({
      marks: [],
      unsent: "none",
      fits: [{ words: "No range on file" }, {}],
    });
    expect(draft).toMatchObject({
      may: { mark: true, publish: true },
      mayHear: true,
      preview: { told: 1, unchanged: 0, takenOff: 0 },
    });
    expect(draft.round?.startsAt).toBe("2027-03-23T18:00:00.000Z");
  });

  test("says of each person what publishing would change, and the numbers agree with what it then does", async () => {
    as(world.people.md.userId);
    await mark(world.people.otherActor, round.bet, true);
    await publishRound({ productionId: world.productionId, roundId: round.roundId, version: 1 });
    expect((await draftFor(world.people.md.userId)).preview).toEqual({
      told: 0,
      unchanged: 2,
      takenOff: 0,
    });
    await mark(world.people.actor, round.bet, true);
    await mark(world.people.otherActor, round.bet, false);
    const draft = await draftFor(world.people.md.userId);
    expect(draft.singers.map((s) => s.unsent)).toEqual(["changed", "off"]);
    expect(draft.preview).toEqual({ told: 1, unchanged: 0, takenOff: 1 });
    expect(
      await publishRound({ productionId: world.productionId, roundId: round.roundId, version: 2 }),
    ).toEqual({ ok: true, data: draft.preview });
  });

  test("someone who withdrew is shown while their mark stands, and is sent nothing", async () => {
    as(world.people.md.userId);
    const [signUp] = await db
      .select({ id: t.signUps.id })
      .from(t.signUps)
      .where(eq(t.signUps.personId, world.people.actor.personId));
    expect(
      (await withdrawSignUp({ productionId: world.productionId, signUpId: signUp?.id ?? "" })).ok,
    ).toBe(true);
    const draft = await draftFor(world.people.md.userId);
    expect(draft.singers[0]).toMatchObject({
      name: "Wren Tallis",
      withdrawn: true,
      unsent: "none",
    });
    expect(draft.preview?.told).toBe(0);
    await mark(world.people.actor, round.maren, false);
    expect((await draftFor(world.people.md.userId)).singers.map((s) => s.name)).toEqual([
      "Dele Fashanu",
    ]);
  });

  test("the table marks and hears but does not publish; the stage manager only reads", async () => {
    expect(await draftFor(world.people.director.userId)).toMatchObject({
      may: { mark: true, publish: false },
      mayHear: true,
      preview: null,
    });
    expect(await draftFor(world.people.stageManager.userId)).toMatchObject({
      may: { mark: false, publish: false },
      mayHear: false,
      preview: null,
    });
  });

  test.each(["actor", "accompanist"] as const)("refuses the %s", async (who) => {
    as(world.people[who].userId);
    const response = await ask();
    expect(response.status).toBe(403);
    expect(JSON.stringify(await response.json())).not.toContain("Wren");
  });

  test("is not there for another company, nor in a production that is none, nor for nobody", async () => {
    as(world.people.outsiderMd.userId);
    expect((await ask()).status).toBe(404);
    as(world.people.md.userId);
    expect((await ask(world.otherProductionId)).status).toBe(404);
    expect((await ask("not-an-id")).status).toBe(404);
    as(null);
    expect((await ask()).status).toBe(401);
  });
});

test("the rooms to choose from are those of the production's own company", async () => {
  const md = await loadActor(world.people.md.userId);
  if (!md) throw new Error("no such login");
  expect(
    (await roomsOfProduction(md, world.productionId)).map((room) => `${room.name}, ${room.venue}`),
  ).toEqual(["Room 1, Lantern Street", "Room 2, Lantern Street"]);
  await expect(roomsOfProduction(md, world.otherProductionId)).rejects.toMatchObject({
    code: "not-found",
  });
});
