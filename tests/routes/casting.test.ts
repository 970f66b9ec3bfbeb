import { beforeEach, describe, expect, test } from "vitest";
import { GET } from "@/app/api/productions/[productionId]/casting/route";
import { choose, publishCast } from "@/app/(season)/productions/[productionId]/casting/actions";
import type { Grid } from "@/lib/client/casting";
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
  GET(new Request(`http://localhost:3000/api/productions/${productionId}/casting`), {
    params: Promise.resolve({ productionId }),
  });
async function gridFor(userId: string): Promise<Grid> {
  as(userId);
  const response = await ask();
  expect(response.status).toBe(200);
  expect(response.headers.get("cache-control")).toBe("private, no-store");
  return (await response.json()) as Grid;
}

describe("GET casting", () => {
  test("gives only what a cell needs: range, verdict in words and what is chosen with its version", async () => {
    as(world.people.md.userId);
    await choose({
      productionId: world.productionId,
      roleId: round.maren,
      personId: world.people.actor.personId,
      state: "considered",
      version: 0,
    });
    const grid = await gridFor(world.people.md.userId);
    expect(grid).toMatchObject({ castPublished: false, mayChoose: true, zone: "Europe/London" });
    expect(grid.singers).toEqual([
      {
        personId: world.people.actor.personId,
        name: "Wren Tallis",
        minor: false,
        range: { low: 55, high: 79, comfortableLow: null, comfortableHigh: null, kind: "claimed" },
        calledBackFor: [round.maren],
        answer: null,
        cells: {
          // G3–G5 against B♭3–A5: two semitones missing at the top (counted by hand).
          [round.maren]: {
            verdict: "stretch",
            words: "2 short at top",
            choice: { state: "considered", kind: "principal", version: 1 },
          },
          [round.bet]: { verdict: null, words: "Role has no line yet", choice: null },
        },
      },
    ]);
  });

  test("the table sees it and does not choose; the stage manager sees it once the cast is out", async () => {
    expect((await gridFor(world.people.director.userId)).mayChoose).toBe(false);
    as(world.people.stageManager.userId);
    expect((await ask()).status).toBe(403);
    as(world.people.md.userId);
    await choose({
      productionId: world.productionId,
      roleId: round.maren,
      personId: world.people.actor.personId,
      state: "cast",
      version: 0,
    });
    await publishCast({ productionId: world.productionId, published: true });
    expect(await gridFor(world.people.stageManager.userId)).toMatchObject({
      castPublished: true,
      mayChoose: false,
    });
    as(world.people.md.userId);
    await publishCast({ productionId: world.productionId, published: false });
    as(world.people.stageManager.userId);
    expect((await ask()).status).toBe(403);
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
