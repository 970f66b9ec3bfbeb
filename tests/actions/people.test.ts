import { and, eq, isNull } from "drizzle-orm";
import { beforeEach, describe, expect, test } from "vitest";
import {
  endMembership,
  inviteMember,
  reopenMembership,
} from "@/app/(season)/companies/[companyId]/actions";
import {
  endPosition,
  invitePerson,
  reopenPosition,
} from "@/app/(season)/productions/[productionId]/people/actions";
import { db } from "@/db/client";
import { auditEvents, outbox, people, positions } from "@/db/schema";
import { loadActor } from "@/lib/data/actor";
import { listCompanyMembers, listProductionPeople } from "@/lib/data/people";
import type { PositionKind } from "@/lib/permissions/types";
import { as } from "../helpers/as";
import { makePerson, makeWorld } from "../helpers/world";
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

function invitation(over: Partial<Parameters<typeof invitePerson>[0]> = {}) {
  return {
    companyId: world.companyId,
    productionId: world.productionId as string | null,
    name: "Noor Halloran",
    email: "Noor.Halloran@people.example ",
    phone: "",
    kind: "accompanist" as PositionKind,
    ...over,
  };
}

async function positionOf(personId: string, kind: PositionKind): Promise<string> {
  const [row] = await db
    .select({ id: positions.id })
    .from(positions)
    .where(and(eq(positions.personId, personId), eq(positions.kind, kind)));
  if (!row) throw new Error("no such position");
  return row.id;
}

async function openPositions(personId: string): Promise<string[]> {
  const rows = await db
    .select({ kind: positions.kind })
    .from(positions)
    .where(and(eq(positions.personId, personId), isNull(positions.endedAt)));
  return rows.map((row) => row.kind);
}

describe("inviting into a position of a production", () => {
  test.each(["md", "admin"] as const)("the %s may; the mail waits in the outbox", async (who) => {
    as(world.people[who].userId);
    const done = await invitePerson(invitation());
    expect(done).toMatchObject({ ok: true });
    const listed = await listProductionPeople(
      await actorOf(world.people.md.userId),
      world.productionId,
    );
    expect(listed.find((row) => row.name === "Noor Halloran")).toMatchObject({
      kind: "accompanist",
      email: "noor.halloran@people.example",
      standing: "invited",
    });
    const mail = await db.select().from(outbox);
    expect(mail.map((row) => [row.toEmail, row.template])).toEqual([
      ["noor.halloran@people.example", "invitation"],
    ]);
    const trail = await db
      .select()
      .from(auditEvents)
      .where(eq(auditEvents.action, "position.invite"));
    expect(trail.map((row) => row.summary)).toEqual(["Invited Noor Halloran as accompanist"]);
  });

  test("inviting the same person again sends the invitation again and makes no second position", async () => {
    as(world.people.md.userId);
    const first = await invitePerson(invitation());
    const second = await invitePerson(invitation());
    expect(first.ok && second.ok && first.data.personId === second.data.personId).toBe(true);
    if (first.ok) expect(await openPositions(first.data.personId)).toEqual(["accompanist"]);
    expect(await db.select().from(outbox)).toHaveLength(2);
  });

  test.each([
    ["assistant", "not-allowed"],
    ["stageManager", "not-allowed"],
    ["director", "not-allowed"],
    ["choreographer", "not-allowed"],
    ["producer", "not-allowed"],
    ["accompanist", "not-allowed"],
    ["actor", "not-allowed"],
    ["siblingMd", "not-found"],
    ["outsiderMd", "not-found"],
    ["outsiderAdmin", "not-found"],
  ] as const)("the %s may not: %s", async (who, code) => {
    as(world.people[who].userId);
    expect(await invitePerson(invitation())).toMatchObject({ ok: false, error: { code } });
    expect(await db.select().from(outbox)).toHaveLength(0);
  });

  test("nobody may", async () => {
    as(null);
    expect(await invitePerson(invitation())).toMatchObject({
      ok: false,
      error: { code: "signed-out" },
    });
  });

  test("a production named with another company's id is not there", async () => {
    as(world.people.md.userId);
    expect(await invitePerson(invitation({ companyId: world.otherCompanyId }))).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
  });

  test("a company's position is no position of a production, and the other way round", async () => {
    as(world.people.admin.userId);
    expect(await invitePerson(invitation({ kind: "company_admin" }))).toMatchObject({
      ok: false,
      error: { code: "invalid", fields: { kind: expect.any(String) as string } },
    });
    expect(await inviteMember(invitation({ productionId: null, kind: "actor" }))).toMatchObject({
      ok: false,
      error: { code: "invalid", fields: { kind: expect.any(String) as string } },
    });
  });
});

describe("ending a position", () => {
  test("gives nothing from then on, and can be taken back", async () => {
    as(world.people.md.userId);
    const positionId = await positionOf(world.people.accompanist.personId, "accompanist");
    expect(await endPosition({ positionId })).toMatchObject({ ok: true });
    expect((await actorOf(world.people.accompanist.userId)).positions).toEqual([]);
    expect(await reopenPosition({ positionId })).toMatchObject({ ok: true });
    // Pressed twice: still open, still once.
    expect(await reopenPosition({ positionId })).toMatchObject({ ok: true });
    expect(await openPositions(world.people.accompanist.personId)).toEqual(["accompanist"]);
  });

  test("the last music director stays, until there is another", async () => {
    as(world.people.md.userId);
    const positionId = await positionOf(world.people.md.personId, "music_director");
    expect(await endPosition({ positionId })).toMatchObject({
      ok: false,
      error: {
        code: "refused",
        message: expect.stringContaining("Invite the next one first") as string,
      },
    });
    await makePerson(world.companyId, "Sunniva Ekeland", {
      kind: "music_director",
      productionId: world.productionId,
    });
    expect(await endPosition({ positionId })).toMatchObject({ ok: true });
  });

  test("two music directors who end each other at once leave one", async () => {
    const other = await makePerson(world.companyId, "Sunniva Ekeland", {
      kind: "music_director",
      productionId: world.productionId,
    });
    as(world.people.admin.userId);
    const results = await Promise.all([
      endPosition({ positionId: await positionOf(world.people.md.personId, "music_director") }),
      endPosition({ positionId: await positionOf(other.personId, "music_director") }),
    ]);
    expect(results.filter((result) => result.ok)).toHaveLength(1);
    const left = [
      ...(await openPositions(world.people.md.personId)),
      ...(await openPositions(other.personId)),
    ];
    expect(left).toEqual(["music_director"]);
  });

  test("a position held again meanwhile is not opened twice", async () => {
    as(world.people.md.userId);
    const { personId, email } = world.people.accompanist;
    const positionId = await positionOf(personId, "accompanist");
    await endPosition({ positionId });
    await invitePerson(invitation({ name: "Hanne Briscoe", email }));
    expect(await reopenPosition({ positionId })).toMatchObject({
      ok: false,
      error: { code: "stale" },
    });
    expect(await openPositions(personId)).toEqual(["accompanist"]);
  });

  test.each([
    ["stageManager", "not-allowed"],
    ["actor", "not-allowed"],
    ["siblingMd", "not-found"],
    ["outsiderAdmin", "not-found"],
  ] as const)("the %s may neither end nor open one: %s", async (who, code) => {
    const positionId = await positionOf(world.people.accompanist.personId, "accompanist");
    as(world.people[who].userId);
    expect(await endPosition({ positionId })).toMatchObject({ ok: false, error: { code } });
    expect(await reopenPosition({ positionId })).toMatchObject({ ok: false, error: { code } });
    expect(await openPositions(world.people.accompanist.personId)).toEqual(["accompanist"]);
  });
});

describe("positions in the company itself", () => {
  test("only an admin invites, and the last admin stays", async () => {
    const input = invitation({ productionId: null, kind: "company_admin" });
    as(world.people.md.userId);
    expect(await inviteMember(input)).toMatchObject({ ok: false, error: { code: "not-allowed" } });
    as(world.people.outsiderAdmin.userId);
    expect(await inviteMember(input)).toMatchObject({ ok: false, error: { code: "not-found" } });
    as(world.people.admin.userId);
    const positionId = await positionOf(world.people.admin.personId, "company_admin");
    expect(await endMembership({ positionId })).toMatchObject({
      ok: false,
      error: { code: "refused" },
    });
    expect(await inviteMember(input)).toMatchObject({ ok: true });
    const members = await listCompanyMembers(
      await actorOf(world.people.admin.userId),
      world.companyId,
    );
    expect(members.map((row) => [row.name, row.kind, row.standing])).toEqual([
      ["Cora Finch", "company_admin", "joined"],
      ["Noor Halloran", "company_admin", "invited"],
    ]);
    const [noor] = await db
      .select({ id: people.id })
      .from(people)
      .where(eq(people.email, "noor.halloran@people.example"));
    const theirs = await positionOf(noor?.id ?? "", "company_admin");
    expect(await endMembership({ positionId: theirs })).toMatchObject({ ok: true });
    expect(await reopenMembership({ positionId: theirs })).toMatchObject({ ok: true });
  });

  test("nobody but an admin reads the members", async () => {
    for (const who of ["md", "stageManager", "actor"] as const) {
      await expect(
        listCompanyMembers(await actorOf(world.people[who].userId), world.companyId),
      ).rejects.toMatchObject({ code: "not-allowed" });
    }
    await expect(
      listCompanyMembers(await actorOf(world.people.outsiderAdmin.userId), world.companyId),
    ).rejects.toMatchObject({ code: "not-found" });
  });
});

describe("who sees the people of a production", () => {
  test("the table sees names without contacts; the stage manager both", async () => {
    const asDirector = await listProductionPeople(
      await actorOf(world.people.director.userId),
      world.productionId,
    );
    expect(asDirector).toHaveLength(9);
    expect(asDirector.every((row) => row.email === null && row.phone === null)).toBe(true);
    const asSm = await listProductionPeople(
      await actorOf(world.people.stageManager.userId),
      world.productionId,
    );
    expect(asSm.every((row) => row.email !== null)).toBe(true);
  });

  test.each([
    ["accompanist", "not-allowed"],
    ["actor", "not-allowed"],
    ["siblingMd", "not-found"],
    ["outsiderMd", "not-found"],
  ] as const)("the %s does not: %s", async (who, code) => {
    await expect(
      listProductionPeople(await actorOf(world.people[who].userId), world.productionId),
    ).rejects.toMatchObject({ code });
  });
});
