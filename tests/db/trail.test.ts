import { eq } from "drizzle-orm";
import { beforeEach, describe, expect, test } from "vitest";
import { db } from "@/db/client";
import * as t from "@/db/schema";
import { loadActor } from "@/lib/data/actor";
import { recordAudit } from "@/lib/data/audit";
import { listCompaniesRun, readCompany } from "@/lib/data/companies";
import { readTrail } from "@/lib/data/trail";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
beforeEach(async () => {
  world = await makeWorld();
});

async function actorOf(userId: string) {
  const actor = await loadActor(userId);
  if (!actor) throw new Error("no such login");
  return actor;
}

describe("companies and their trails", () => {
  test("those who run a production or the company enter it; its actors and accompanists do not", async () => {
    for (const who of ["admin", "md", "assistant", "stageManager", "director"] as const) {
      const company = await readCompany(await actorOf(world.people[who].userId), world.companyId);
      expect(company.name).toBe("Lantern Street Theatre");
    }
    for (const who of ["actor", "accompanist", "outsiderAdmin", "outsiderMd"] as const) {
      const actor = await actorOf(world.people[who].userId);
      await expect(readCompany(actor, world.companyId)).rejects.toMatchObject({
        code: "not-found",
      });
    }
    expect(await listCompaniesRun(await actorOf(world.people.actor.userId))).toEqual([]);
  });

  test("the admin reads the company's, the music director their own production's, others none", async () => {
    const { companyId, productionId, siblingProductionId, otherCompanyId } = world;
    const entry = { action: "role.add", subjectKind: "role" };
    await recordAudit(db, null, { ...entry, companyId, productionId, summary: "Here" });
    await recordAudit(db, null, {
      ...entry,
      companyId,
      productionId: siblingProductionId,
      summary: "Beside",
    });
    await recordAudit(db, null, { ...entry, companyId, summary: "Company" });
    await recordAudit(db, null, { ...entry, companyId: otherCompanyId, summary: "Theirs" });
    const read = async (who: keyof World["people"], query: { productionId?: string } = {}) =>
      (
        await readTrail(await actorOf(world.people[who].userId), { companyId, ...query })
      ).events.map((event) => event.what);
    expect((await read("admin")).sort()).toEqual(["Beside", "Company", "Here"]);
    expect(await read("admin", { productionId: siblingProductionId })).toEqual(["Beside"]);
    expect(await read("md")).toEqual(["Here"]);
    expect(await read("stageManager", { productionId })).toEqual(["Here"]);
    const refused = { code: "not-found" };
    await expect(read("md", { productionId: siblingProductionId })).rejects.toMatchObject(refused);
    await expect(read("admin", { productionId: world.otherProductionId })).rejects.toMatchObject(
      refused,
    );
    for (const who of ["director", "actor", "accompanist", "outsiderAdmin"] as const) {
      await expect(read(who)).rejects.toMatchObject(refused);
    }
  });

  test("who was chosen for what is kept from the stage manager until the list is out, and from the admin", async () => {
    const { companyId, productionId } = world;
    await recordAudit(db, null, {
      companyId,
      productionId,
      action: "casting.choose",
      subjectKind: "role",
      summary: "Wren Tallis as Orsolo: cast",
    });
    const seenBy = async (who: keyof World["people"]) =>
      (await readTrail(await actorOf(world.people[who].userId), { companyId })).events.length;
    expect([await seenBy("md"), await seenBy("stageManager"), await seenBy("admin")]).toEqual([
      1, 0, 0,
    ]);
    await db
      .update(t.productions)
      .set({ castPublishedAt: new Date() })
      .where(eq(t.productions.id, productionId));
    expect([await seenBy("md"), await seenBy("stageManager"), await seenBy("admin")]).toEqual([
      1, 1, 0,
    ]);
  });

  test("fifty a page, the newest first; a percent sign is looked for as itself", async () => {
    const { companyId } = world;
    for (let i = 0; i < 51; i += 1) {
      await db.insert(t.auditEvents).values({
        companyId,
        actorName: "Cora Finch",
        action: "venue.add",
        subjectKind: "venue",
        summary: i === 0 ? "Took 100% of the rooms" : `Added venue ${String(i)}`,
        at: new Date(Date.UTC(2027, 2, 1, 10, i)),
      });
    }
    const actor = await actorOf(world.people.admin.userId);
    const first = await readTrail(actor, { companyId });
    expect([first.events.length, first.hasNext, first.events[0]?.what]).toEqual([
      50,
      true,
      "Added venue 50",
    ]);
    const second = await readTrail(actor, { companyId, page: 2 });
    expect(second.events.map((e) => e.what)).toEqual(["Took 100% of the rooms"]);
    expect(second.hasNext).toBe(false);
    expect((await readTrail(actor, { companyId, text: "%" })).events).toHaveLength(1);
    expect((await readTrail(actor, { companyId, text: "cora" })).events).toHaveLength(50);
  });
});
