import { beforeAll, expect, test } from "vitest";
import { createCall } from "@/app/(season)/productions/[productionId]/rehearsals/actions";
import { GET } from "@/app/api/productions/[productionId]/calls/[callId]/clashes/route";
import { as } from "../helpers/as";
import { addConflict, callForm, makeRehearsalWorld } from "../helpers/rehearsal-world";
import type { RehearsalWorld } from "../helpers/rehearsal-world";

let world: RehearsalWorld;
let callId: string;
beforeAll(async () => {
  world = await makeRehearsalWorld();
  as(world.people.md.userId);
  const made = await createCall(callForm(world));
  if (!made.ok) throw new Error(JSON.stringify(made.error));
  callId = made.data.callId;
});

const ask = (productionId = world.productionId, id = callId) =>
  GET(new Request("http://localhost:3000/"), {
    params: Promise.resolve({ productionId, callId: id }),
  });

test("the clashes of a saved call, and the conflicts its order goes around", async () => {
  // Dele is first needed at 19:00 (18:00Z): a conflict until then is gone around; Wren's is not.
  await addConflict(
    world.people.otherActor.personId,
    "2027-04-06T17:00:00Z",
    "2027-04-06T18:00:00Z",
    "agreed",
  );
  await addConflict(world.people.actor.personId, "2027-04-06T17:00:00Z", "2027-04-06T17:40:00Z");
  as(world.people.stageManager.userId);
  const response = await ask();
  expect(response.status).toBe(200);
  const body = (await response.json()) as { clashes: { words: string }[]; around: string[] };
  expect(body.clashes.map((clash) => clash.words)).toEqual([
    "Wren Tallis cannot come 18:00–18:40 (Evening class), asked, not agreed yet: 10 min of this call",
  ]);
  expect(body.around).toEqual([
    "Dele Fashanu cannot come 18:00–19:00 (Evening class): their blocks are after it.",
  ]);
});

test("is for those who plan, in their own production", async () => {
  for (const person of [world.people.accompanist, world.people.actor]) {
    as(person.userId);
    expect((await ask()).status).toBe(403);
  }
  // A draft does not exist for those who only read.
  for (const person of [
    world.people.director,
    world.people.admin,
    world.people.outsiderMd,
    world.people.siblingMd,
  ]) {
    as(person.userId);
    expect((await ask()).status).toBe(404);
  }
  as(world.people.siblingMd.userId);
  expect((await ask(world.siblingProductionId)).status).toBe(404);
  as(world.people.md.userId);
  expect((await ask(world.productionId, "nonsense")).status).toBe(404);
  as(null);
  expect((await ask()).status).toBe(401);
});
