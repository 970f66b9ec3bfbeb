import { db } from "@/db/client";
import { newId } from "@/db/columns";
import * as t from "@/db/schema";
import type { World } from "./world";

/**
 * Two roles, two singers and a begun round in the world's production. Maren sings B♭3 to A5 (MIDI 58–81) in one number;
 * Old Bet has no line. The first actor claims G3–G5 (55–79) and is marked for Maren; the second has no range.
 */
export async function makeCallbackRound(world: World) {
  const [maren, bet, numberId, roundId] = [newId(), newId(), newId(), newId()];
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
  await db
    .insert(t.ranges)
    .values({ personId: world.people.actor.personId, kind: "claimed", low: 55, high: 79 });
  await db.insert(t.callbackRounds).values({
    id: roundId,
    productionId: world.productionId,
    title: "Callbacks",
    zone: "Europe/London",
    roomId: world.roomId,
    startsAt: new Date("2027-03-23T18:00:00Z"),
    endsAt: new Date("2027-03-23T21:00:00Z"),
  });
  await db
    .insert(t.callbackMarks)
    .values({ roundId, personId: world.people.actor.personId, roleId: maren });
  return { maren, bet, roundId };
}
