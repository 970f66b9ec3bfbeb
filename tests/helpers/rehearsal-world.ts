import { db } from "@/db/client";
import { newId } from "@/db/columns";
import * as t from "@/db/schema";
import { loadActor } from "@/lib/data/actor";
import type { Actor } from "@/lib/permissions/types";
import { makePerson, makeWorld } from "./world";

/** A signed-in person as the data layer knows them. */
export async function actorOf(userId: string): Promise<Actor> {
  const actor = await loadActor(userId);
  if (!actor) throw new Error("no such login");
  return actor;
}

/**
 * The world with a small score that is cast: Maren (Wren Tallis) sings 1 and 3, Ansel (Dele Fashanu) 2 and 3, and Pip sings
 * 3 and has nobody yet. A cover of Maren, a second accompanist, and the cast list published.
 */
export async function makeRehearsalWorld() {
  const world = await makeWorld();
  const { productionId, companyId, people } = world;
  const cover = await makePerson(companyId, "Imke Dorne", { kind: "actor", productionId });
  const secondPianist = await makePerson(companyId, "Osric Dlamini", {
    kind: "accompanist",
    productionId,
  });
  const numbers = [newId(), newId(), newId()] as const;
  const titles = ["Low Water", "A Letter from Ansel", "The Ness Light"];
  await db.insert(t.numbers).values(
    numbers.map((id, index) => ({
      id,
      productionId,
      label: String(index + 1),
      title: titles[index] ?? "",
      place: index + 1,
      keyName: "G",
      keyFifths: 1,
      tempo: 96,
    })),
  );
  const maren = newId();
  const ansel = newId();
  const pip = newId();
  await db.insert(t.roles).values([
    { id: maren, productionId, name: "Maren", place: 1, covers: 1 },
    { id: ansel, productionId, name: "Ansel", place: 2 },
    { id: pip, productionId, name: "Pip", place: 3 },
  ]);
  const line = (roleId: string, numberId: string) => ({
    roleId,
    numberId,
    source: "typed" as const,
    low: 57,
    high: 74,
    lowSpelled: "A3",
    highSpelled: "D5",
  });
  await db
    .insert(t.vocalLines)
    .values([
      line(maren, numbers[0]),
      line(ansel, numbers[1]),
      line(maren, numbers[2]),
      line(ansel, numbers[2]),
      line(pip, numbers[2]),
    ]);
  await db.insert(t.choices).values([
    { productionId, roleId: maren, personId: people.actor.personId, state: "cast" },
    { productionId, roleId: ansel, personId: people.otherActor.personId, state: "cast" },
    { productionId, roleId: maren, personId: cover.personId, kind: "cover", state: "cast" },
  ]);
  await db.update(t.productions).set({ castPublishedAt: new Date("2026-01-01T00:00:00Z") });
  return { ...world, cover, secondPianist, numbers, roles: { maren, ansel, pip } };
}

export type RehearsalWorld = Awaited<ReturnType<typeof makeRehearsalWorld>>;

/** A call as the form sends it: numbers 1, 2 and 3 with 30, 20 and 40 minutes from 18:30. */
export function callForm(world: RehearsalWorld, change: Record<string, unknown> = {}) {
  return {
    productionId: world.productionId,
    kind: "music" as const,
    title: "",
    localDate: "2027-04-06",
    localTime: "18:30",
    roomId: world.roomId,
    leaderId: world.people.md.personId,
    pianistId: world.people.accompanist.personId,
    blocks: world.numbers.map((numberId, index) => ({
      key: `b${index + 1}`,
      kind: "number" as const,
      minutes: [30, 20, 40][index] ?? 0,
      numberId,
      title: "",
      bars: "",
      detail: "",
    })),
    hand: [] as { personId: string; act: "call" | "excuse"; reason: string; keys: string[] }[],
    ...change,
  };
}

/** A conflict of a person between two instants. */
export async function addConflict(
  personId: string,
  from: string,
  to: string,
  state: "asked" | "agreed" | "declined" = "asked",
): Promise<string> {
  const id = newId();
  await db.insert(t.conflicts).values({
    id,
    personId,
    startsAt: new Date(from),
    endsAt: new Date(to),
    localFrom: from.slice(0, 10),
    localTo: to.slice(0, 10),
    zone: "Europe/London",
    reason: "Evening class",
    state,
  });
  return id;
}
