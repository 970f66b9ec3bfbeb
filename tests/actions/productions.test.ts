import { beforeAll, describe, expect, test } from "vitest";
import { changeProduction, createCompany, createProduction } from "@/app/(season)/actions";
import { loadActor } from "@/lib/data/actor";
import { listProductions } from "@/lib/data/productions";
import { as } from "../helpers/as";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
beforeAll(async () => {
  world = await makeWorld();
});

async function actorOf(userId: string) {
  const actor = await loadActor(userId);
  if (!actor) throw new Error("no such login");
  return actor;
}

describe("a new company and production", () => {
  test("someone new starts a company and a production, and directs its music", async () => {
    as(world.strangerId);
    const company = await createCompany({
      name: "Quayside Players",
      zone: "Europe/London",
      paper: "A4",
    });
    expect(company.ok).toBe(true);
    if (!company.ok) return;
    const production = await createProduction({
      companyId: company.data.companyId,
      title: "Low Water",
      opensOn: "2027-05-01",
      closesOn: "2027-05-09",
    });
    expect(production).toMatchObject({ ok: true });
    const listed = await listProductions(await actorOf(world.strangerId));
    expect(listed.map((p) => [p.title, p.positions])).toEqual([["Low Water", ["music_director"]]]);
  });

  test("a closing before the opening is refused beside its field", async () => {
    as(world.people.admin.userId);
    const result = await createProduction({
      companyId: world.companyId,
      title: "X",
      opensOn: "2027-05-09",
      closesOn: "2027-05-01",
    });
    expect(result).toMatchObject({
      ok: false,
      error: {
        code: "invalid",
        fields: { closesOn: "The last night cannot come before the first." },
      },
    });
  });

  test("an actor may not create one; another company does not exist for them", async () => {
    as(world.people.actor.userId);
    expect(
      await createProduction({ companyId: world.companyId, title: "X", opensOn: "", closesOn: "" }),
    ).toMatchObject({ ok: false, error: { code: "not-allowed" } });
    expect(
      await createProduction({
        companyId: world.otherCompanyId,
        title: "X",
        opensOn: "",
        closesOn: "",
      }),
    ).toMatchObject({ ok: false, error: { code: "not-found" } });
    as(null);
    expect(
      await createProduction({ companyId: world.companyId, title: "X", opensOn: "", closesOn: "" }),
    ).toMatchObject({ ok: false, error: { code: "signed-out" } });
  });
});

describe("two people changing one production", () => {
  test("the second, on stale ground, is refused and nothing is lost", async () => {
    as(world.people.md.userId);
    const change = {
      productionId: world.productionId,
      version: 1,
      title: "The Tidewatcher",
      stage: "casting" as const,
      opensOn: "",
      closesOn: "",
    };
    expect(await changeProduction(change)).toMatchObject({ ok: true });
    as(world.people.assistant.userId);
    expect(await changeProduction({ ...change, stage: "closed" })).toMatchObject({
      ok: false,
      error: { code: "stale" },
    });
    const listed = await listProductions(await actorOf(world.people.md.userId));
    expect(listed.find((p) => p.id === world.productionId)?.stage).toBe("casting");
  });

  test("the music director of another company gets the answer of a production that is not there", async () => {
    as(world.people.outsiderMd.userId);
    const change = {
      productionId: world.productionId,
      version: 2,
      title: "Mine",
      stage: "closed" as const,
      opensOn: "",
      closesOn: "",
    };
    expect(await changeProduction(change)).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
  });
});
