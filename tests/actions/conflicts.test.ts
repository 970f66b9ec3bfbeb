import { eq } from "drizzle-orm";
import { beforeAll, beforeEach, describe, expect, test } from "vitest";
import { addConflict, removeConflicts, restoreConflicts } from "@/app/(me)/actions";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import { auditEvents, companies, conflicts, people } from "@/db/schema";
import { listOwnConflicts } from "@/lib/data/conflicts";
import { actorOf } from "../helpers/actor-of";
import { as } from "../helpers/as";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

const DAY = {
  span: "day" as const,
  from: "2031-05-01",
  to: "",
  timeFrom: "",
  timeTo: "",
  reason: "",
};
let world: World;
/** The actor's record in the second company, whose clocks are in New York. */
let secondRecord: string;
beforeAll(async () => {
  world = await makeWorld();
  secondRecord = newId();
  await db
    .update(companies)
    .set({ zone: "America/New_York" })
    .where(eq(companies.id, world.otherCompanyId));
  await db.insert(people).values({
    id: secondRecord,
    companyId: world.otherCompanyId,
    userId: world.people.actor.userId,
    name: "Wren Tallis",
    email: world.people.actor.email,
  });
});
beforeEach(async () => {
  await db.delete(conflicts);
  await db.delete(auditEvents);
  as(world.people.actor.userId);
});

const mine = async () => listOwnConflicts(await actorOf(world.people.actor.userId));
async function added(
  input: Partial<Omit<typeof DAY, "span">> & {
    personIds?: string[];
    span?: "day" | "days" | "part";
  } = {},
): Promise<string[]> {
  const result = await addConflict({ ...DAY, personIds: [world.people.actor.personId], ...input });
  if (!result.ok) throw new Error(result.error.message);
  return result.data.conflictIds;
}

describe("saying when one cannot come", () => {
  test("a day is the whole day on the company's calendar", async () => {
    await added({ reason: "A wedding" });
    expect(await mine()).toMatchObject([
      {
        localFrom: "2031-05-01",
        localTo: "2031-05-01",
        timeFrom: null,
        timeTo: null,
        reason: "A wedding",
        told: [{ company: "Lantern Street Theatre", state: "asked" }],
      },
    ]);
    const [row] = await db.select().from(conflicts);
    // Summer time in London is UTC+1 (the IANA time zone database).
    expect([row?.startsAt.toISOString(), row?.endsAt.toISOString(), row?.zone]).toEqual([
      "2031-04-30T23:00:00.000Z",
      "2031-05-01T23:00:00.000Z",
      "Europe/London",
    ]);
  });

  test("a range runs to the end of its last day, also over a change of the clocks", async () => {
    await added({ span: "days", from: "2031-03-29", to: "2031-03-30" });
    const [row] = await db.select().from(conflicts);
    // Clocks go forward in London on 30 March 2031, the last Sunday of the month: that day has 23 hours.
    expect([row?.startsAt.toISOString(), row?.endsAt.toISOString()]).toEqual([
      "2031-03-29T00:00:00.000Z",
      "2031-03-30T23:00:00.000Z",
    ]);
  });

  test("part of a day has its times, and fields that the choice hides do not count", async () => {
    await added({ span: "part", timeFrom: "14:00", timeTo: "17:30", to: "2031-09-09" });
    await added({
      span: "day",
      from: "2031-05-02",
      to: "2031-09-09",
      timeFrom: "14:00",
      timeTo: "09:00",
    });
    expect(
      (await mine()).map(({ localFrom, localTo, timeFrom, timeTo }) => [
        localFrom,
        localTo,
        timeFrom,
        timeTo,
      ]),
    ).toEqual([
      ["2031-05-01", "2031-05-01", "14:00", "17:30"],
      ["2031-05-02", "2031-05-02", null, null],
    ]);
  });

  test("told to two companies it is one entry, with each one's clocks", async () => {
    const ids = await added({ personIds: [world.people.actor.personId, secondRecord] });
    expect(ids).toHaveLength(2);
    expect(await mine()).toMatchObject([
      { told: [{ company: "Fenmoor Conservatory" }, { company: "Lantern Street Theatre" }] },
    ]);
    const rows = await db
      .select({ personId: conflicts.personId, startsAt: conflicts.startsAt })
      .from(conflicts);
    expect(rows.find((row) => row.personId === secondRecord)?.startsAt.toISOString()).toBe(
      "2031-05-01T04:00:00.000Z",
    );
  });

  test("told twice, or ten times at once, it is there once", async () => {
    const answers = await Promise.all(Array.from({ length: 10 }, () => added()));
    expect(new Set(answers.flat()).size).toBe(1);
    expect(await db.$count(conflicts)).toBe(1);
  });

  test("told again with a reason, the reason is the new one", async () => {
    await added();
    await added({ reason: "A wedding" });
    await added();
    expect((await mine()).map((entry) => entry.reason)).toEqual(["A wedding"]);
  });

  test("the trail says that, never why", async () => {
    await added({ reason: "A private reason" });
    const trail = await db.select().from(auditEvents);
    expect(trail.map((row) => row.summary)).toEqual(["Wren Tallis cannot come: Thu 1 May"]);
    expect(JSON.stringify(trail)).not.toContain("private");
  });

  test.each([
    ["a day that does not exist", { from: "2031-02-30" }, "from"],
    ["no day", { from: "" }, "from"],
    ["a day that is over", { from: "2020-01-01" }, "from"],
    ["a range without its end", { span: "days" as const }, "to"],
    ["a range that runs backwards", { span: "days" as const, to: "2031-04-30" }, "to"],
    ["a range of more than a year", { span: "days" as const, to: "2032-06-01" }, "to"],
    ["a part without times", { span: "part" as const }, "timeFrom"],
    [
      "a part that ends before it begins",
      { span: "part" as const, timeFrom: "17:00", timeTo: "14:00" },
      "timeTo",
    ],
    [
      "a time that is none",
      { span: "part" as const, timeFrom: "25:00", timeTo: "26:00" },
      "timeFrom",
    ],
    ["no company", { personIds: [] }, "personIds"],
  ])("%s is refused beside its field", async (_what, input, field) => {
    const result = await addConflict({
      ...DAY,
      personIds: [world.people.actor.personId],
      ...input,
    });
    expect(result).toMatchObject({
      ok: false,
      error: { code: "invalid", fields: { [field]: expect.any(String) } },
    });
    expect(await db.$count(conflicts)).toBe(0);
  });
});

describe("taking it back", () => {
  test("takes all of an entry's rows, and puts them back with the answers they had", async () => {
    const conflictIds = await added({ personIds: [world.people.actor.personId, secondRecord] });
    await db.update(conflicts).set({ state: "agreed" }).where(eq(conflicts.personId, secondRecord));
    expect(await removeConflicts({ conflictIds })).toMatchObject({ ok: true });
    expect(await mine()).toEqual([]);
    expect(await restoreConflicts({ conflictIds })).toMatchObject({ ok: true });
    expect(await mine()).toMatchObject([{ told: [{ state: "agreed" }, { state: "asked" }] }]);
  });

  test("doing it twice is doing it once", async () => {
    const conflictIds = await added();
    await removeConflicts({ conflictIds });
    expect(await removeConflicts({ conflictIds })).toMatchObject({ ok: true });
    expect(await db.$count(auditEvents, eq(auditEvents.action, "conflict.take-back"))).toBe(1);
  });
});

describe("somebody else's dates", () => {
  test("nobody writes for another: not a colleague, not the music director, not the admin, not nobody", async () => {
    const { otherActor, md, stageManager, admin, outsiderMd } = world.people;
    for (const other of [otherActor, md, stageManager, admin, outsiderMd]) {
      as(other.userId);
      expect(await addConflict({ ...DAY, personIds: [world.people.actor.personId] })).toMatchObject(
        { ok: false, error: { code: "not-found" } },
      );
      expect(
        await addConflict({ ...DAY, personIds: [other.personId, world.people.actor.personId] }),
      ).toMatchObject({ ok: false, error: { code: "not-found" } });
    }
    as(null);
    expect(await addConflict({ ...DAY, personIds: [world.people.actor.personId] })).toMatchObject({
      ok: false,
      error: { code: "signed-out" },
    });
    expect(await db.$count(conflicts)).toBe(0);
  });

  test("nobody takes another's back, not even beside their own", async () => {
    const theirs = await added();
    const { otherActor, stageManager } = world.people;
    as(otherActor.userId);
    const own = await addConflict({ ...DAY, personIds: [otherActor.personId] });
    if (!own.ok) throw new Error(own.error.message);
    const both = { conflictIds: [...own.data.conflictIds, ...theirs] };
    expect(await removeConflicts(both)).toMatchObject({ ok: false, error: { code: "not-found" } });
    expect(await restoreConflicts({ conflictIds: theirs })).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
    as(stageManager.userId);
    expect(await removeConflicts({ conflictIds: theirs })).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
    expect(await mine()).toHaveLength(1);
    expect(await listOwnConflicts(await actorOf(otherActor.userId))).toHaveLength(1);
  });
});
