import { and, eq } from "drizzle-orm";
import { beforeAll, describe, expect, test } from "vitest";
import {
  addNumber,
  addRole,
  changeNumber,
  changeRole,
  confirmReading,
  moveNumber,
  removeLine,
  removeNumber,
  removeRole,
  restoreNumber,
  restoreRole,
  shiftPart,
  writeLine,
} from "@/app/(season)/productions/[productionId]/score/actions";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import * as t from "@/db/schema";
import { loadActor } from "@/lib/data/actor";
import { readScoreView } from "@/lib/data/score/page";
import { scoreReview } from "@/lib/data/score/review";
import { numbersOf, roleVoices, roleVoicesIn } from "@/lib/data/score/voices";
import { as } from "../helpers/as";
import { LONG_DAY, confirmation, keep, partsOf } from "../helpers/score";
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

const numberInput = (label: string, title = `Number ${label}`) => ({
  productionId: world.productionId,
  label,
  title,
  key: "d",
  metre: "3/4",
  tempo: "96",
  bars: "40",
  length: "2:10",
});
const roleInput = (name: string) => ({
  productionId: world.productionId,
  name,
  kind: "principal" as const,
  needed: "1",
  covers: "1",
  about: "",
});

async function data<T>(
  result: Promise<{ ok: true; data: T } | { ok: false; error: { message: string } }>,
): Promise<T> {
  const answer = await result;
  if (!answer.ok) throw new Error(JSON.stringify(answer.error));
  return answer.data;
}

const makeNumber = async (label: string): Promise<string> =>
  (await data(addNumber(numberInput(label)))).numberId;
const makeRole = async (name: string): Promise<string> =>
  (await data(addRole(roleInput(name)))).roleId;

function linesIn(numberId: string) {
  return db
    .select({
      id: t.vocalLines.id,
      role: t.roles.name,
      roleId: t.roles.id,
      source: t.vocalLines.source,
      low: t.vocalLines.lowSpelled,
      high: t.vocalLines.highSpelled,
      scorePartId: t.vocalLines.scorePartId,
    })
    .from(t.vocalLines)
    .innerJoin(t.roles, eq(t.roles.id, t.vocalLines.roleId))
    .where(eq(t.vocalLines.numberId, numberId))
    .orderBy(t.vocalLines.id);
}

describe("numbers", () => {
  test("are added, changed, moved, removed and put back by the music director", async () => {
    as(world.people.md.userId);
    const first = await makeNumber("1");
    const second = await makeNumber("2");
    expect(
      await changeNumber({
        ...numberInput("1a", "Low Water"),
        numberId: first,
        version: 1,
        key: "E flat",
      }),
    ).toMatchObject({ ok: true });
    const [row] = await db.select().from(t.numbers).where(eq(t.numbers.id, first));
    expect(row).toMatchObject({
      label: "1a",
      title: "Low Water",
      keyName: "E♭",
      keyFifths: -3,
      metre: "3/4",
      tempo: 96,
      bars: 40,
      seconds: 130,
      version: 2,
    });
    const actor = await actorOf(world.people.md.userId);
    const order = async (): Promise<string[]> =>
      (await numbersOf(actor, world.productionId)).map((n) => n.label);
    expect(await order()).toEqual(["1a", "2"]);
    await data(moveNumber({ productionId: world.productionId, numberId: second, direction: "up" }));
    expect(await order()).toEqual(["2", "1a"]);
    await data(moveNumber({ productionId: world.productionId, numberId: second, direction: "up" }));
    expect(await order()).toEqual(["2", "1a"]);
    await data(removeNumber({ productionId: world.productionId, numberId: second }));
    expect(await order()).toEqual(["1a"]);
    expect(
      await removeNumber({ productionId: world.productionId, numberId: second }),
    ).toMatchObject({ ok: false, error: { code: "not-found" } });
    await data(restoreNumber({ productionId: world.productionId, numberId: second }));
    expect(await order()).toEqual(["2", "1a"]);
  });

  test("a label is one of a kind, also when ten add it at once and when one comes back", async () => {
    as(world.people.md.userId);
    const results = await Promise.all(
      Array.from({ length: 10 }, () => addNumber(numberInput("77"))),
    );
    expect(results.filter((result) => result.ok)).toHaveLength(1);
    expect(results.find((result) => !result.ok)).toMatchObject({
      error: { code: "invalid", fields: { label: expect.stringContaining("77") } },
    });
    const gone = await makeNumber("78");
    await data(removeNumber({ productionId: world.productionId, numberId: gone }));
    await makeNumber("78");
    expect(await restoreNumber({ productionId: world.productionId, numberId: gone })).toMatchObject(
      { ok: false, error: { code: "invalid" } },
    );
  });

  test("what cannot be read is said beside its field", async () => {
    as(world.people.md.userId);
    const bad = {
      ...numberInput("", ""),
      key: "H",
      metre: "3/5",
      tempo: "quick",
      bars: "0",
      length: "3.5",
    };
    const result = await addNumber(bad);
    expect(result.ok ? [] : Object.keys(result.error.fields ?? {}).sort()).toEqual([
      "bars",
      "key",
      "label",
      "length",
      "metre",
      "tempo",
      "title",
    ]);
  });

  test("the second of two changes is refused as stale", async () => {
    as(world.people.md.userId);
    const numberId = await makeNumber("5");
    const change = { ...numberInput("5", "A"), numberId, version: 1 };
    const [one, two] = await Promise.all([
      changeNumber(change),
      changeNumber({ ...change, title: "B" }),
    ]);
    expect([one.ok, two.ok].sort()).toEqual([false, true]);
    expect([one, two].find((result) => !result.ok)).toMatchObject({ error: { code: "stale" } });
  });
});

describe("roles and typed lines", () => {
  test("a role is added, changed, removed and put back; its name is one of a kind", async () => {
    as(world.people.md.userId);
    const roleId = await makeRole("Maren");
    expect(await addRole(roleInput(" maren "))).toMatchObject({
      ok: false,
      error: { fields: { name: expect.any(String) } },
    });
    await data(
      changeRole({
        ...roleInput("Maren"),
        roleId,
        version: 1,
        kind: "ensemble",
        needed: "14",
        covers: "2",
      }),
    );
    expect(await changeRole({ ...roleInput("Maren"), roleId, version: 1 })).toMatchObject({
      ok: false,
      error: { code: "stale" },
    });
    expect((await db.select().from(t.roles).where(eq(t.roles.id, roleId)))[0]).toMatchObject({
      kind: "ensemble",
      needed: 14,
      covers: 2,
    });
    await data(removeRole({ productionId: world.productionId, roleId }));
    const actor = await actorOf(world.people.md.userId);
    expect((await roleVoices(actor, world.productionId)).some((role) => role.id === roleId)).toBe(
      false,
    );
    await data(restoreRole({ productionId: world.productionId, roleId }));
    expect((await roleVoices(actor, world.productionId)).some((role) => role.id === roleId)).toBe(
      true,
    );
    expect(
      await changeRole({ ...roleInput("Maren"), roleId, version: 2, needed: "0" }),
    ).toMatchObject({ ok: false, error: { fields: { needed: expect.any(String) } } });
  });

  test("a line is typed as notes, typed over, and removed", async () => {
    as(world.people.md.userId);
    const [roleId, numberId] = [await makeRole("Ansel"), await makeNumber("10")];
    const line = { productionId: world.productionId, roleId, numberId, low: "Bb2", high: "f#4" };
    await data(writeLine(line));
    expect(await linesIn(numberId)).toMatchObject([
      { role: "Ansel", source: "typed", low: "B♭2", high: "F♯4" },
    ]);
    await data(writeLine({ ...line, high: "G4" }));
    const lines = await linesIn(numberId);
    expect(lines).toMatchObject([{ low: "B♭2", high: "G4" }]);
    const voice = (await roleVoicesIn(db, world.productionId)).find((role) => role.id === roleId);
    expect(voice).toMatchObject({
      line: { low: 46, high: 67 },
      perNumber: [{ numberId, label: "10", line: { low: 46, high: 67 } }],
    });
    await data(removeLine({ productionId: world.productionId, lineId: lines[0]!.id }));
    expect(await linesIn(numberId)).toEqual([]);
  });

  test.each([
    [{ low: "H4", high: "C5" }, "low"],
    [{ low: "C4", high: "" }, "high"],
    [{ low: "C5", high: "C4" }, "low"],
    [{ low: "C0", high: "C4" }, "low"],
  ])("%o is refused beside its field", async (pitches, field) => {
    as(world.people.md.userId);
    const result = await writeLine({
      productionId: world.productionId,
      roleId: newId(),
      numberId: newId(),
      ...pitches,
    });
    expect(result).toMatchObject({
      ok: false,
      error: { code: "invalid", fields: { [field]: expect.any(String) } },
    });
  });
});

describe("a score read in", () => {
  // Ranges and quantiles: an independent parser in Python, in agreement with verovio 6.3.0 and MuseScore 3.2.3 (tests/fixtures/music/README.md).
  test("the review shows parts with range, tessitura and the one that looks an octave high, and writes nothing", async () => {
    const md = await actorOf(world.people.md.userId);
    const kept = await keep(md.userId, world.productionId);
    const before = [
      await db.$count(t.numbers),
      await db.$count(t.roles),
      await db.$count(t.vocalLines),
    ];
    const review = await scoreReview(md, world.productionId, kept.scoreId);
    expect(
      review.parts
        .map((part) => [
          part.name,
          part.vocal,
          part.line?.lowSpelled,
          part.line?.highSpelled,
          part.line?.tessitura,
          part.looksOff,
        ])
        .slice(0, 4),
    ).toEqual([
      [
        "Alto (or 1st Tenor)",
        true,
        "G♯4",
        "B5",
        { low: 73, high: 78 },
        { shift: -1, voice: "an alto" },
      ],
      ["2nd Tenor", true, "E3", "G♯4", { low: 58, high: 63 }, null],
      ["1st Bass", true, "G♯2", "D4", { low: 52, high: 57 }, null],
      ["2nd Bass", true, "E2", "B3", { low: 47, high: 52 }, null],
    ]);
    expect(review.parts[4]).toMatchObject({ name: "Piano", vocal: false });
    // 67 bars of 3/4 at 66: 201 quarters, 3 min 3 s.
    expect(review.proposed).toMatchObject({
      title: "The Long Day Closes",
      key: "E",
      keyFifths: 4,
      metre: "3/4",
      tempo: "66",
      bars: "67",
      length: "3:03",
    });
    expect(review.numberId).toBeNull();
    expect([
      await db.$count(t.numbers),
      await db.$count(t.roles),
      await db.$count(t.vocalLines),
    ]).toEqual(before);
  });

  test("confirming writes number, roles and lines together; the octave goes with it and can be changed after", async () => {
    const md = world.people.md.userId;
    const kept = await keep(md, world.productionId);
    const [alto, tenor, bass, bass2, piano] = (await partsOf(kept.scoreId)).map((part) => part.id);
    const standing = await makeRole("Second Tenor");
    const input = confirmation(
      world.productionId,
      kept.scoreId,
      [
        { scorePartId: alto!, to: "new", name: "Alto", octaveShift: -1 },
        { scorePartId: tenor!, to: standing },
        { scorePartId: bass!, to: "new", name: "Basses" },
        { scorePartId: bass2!, to: "new", name: "basses" },
        { scorePartId: piano!, to: "leave" },
      ],
      { label: "20" },
    );
    const confirmed = await data(confirmReading(input));
    expect(confirmed).toMatchObject({ lines: 4, newRoles: 2, replaced: 0 });
    const lines = await linesIn(confirmed.numberId);
    expect(lines.map((line) => [line.role, line.source, line.low, line.high])).toEqual([
      ["Alto", "read", "G♯3", "B4"],
      ["Second Tenor", "read", "E3", "G♯4"],
      ["Basses", "read", "G♯2", "D4"],
      ["Basses", "read", "E2", "B3"],
    ]);
    const view = await readScoreView(await actorOf(md), world.productionId);
    expect(view.lines.find((line) => line.partName === "1st Bass")).toMatchObject({
      lowBar: "28",
      highBar: "55",
      octaveShift: 0,
    });
    expect(view.numbers.find((number) => number.id === confirmed.numberId)).toMatchObject({
      keyName: "E",
      seconds: 183,
      fileName: "sullivan-the-long-day-closes.mxl",
    });
    const voices = await roleVoices(await actorOf(md), world.productionId);
    expect(voices.find((role) => role.name === "Basses")?.line).toMatchObject({
      low: 40,
      high: 62,
    });
    expect(
      (await numbersOf(await actorOf(md), world.productionId)).find(
        (n) => n.id === confirmed.numberId,
      )?.roleIds,
    ).toHaveLength(3);

    await data(shiftPart({ productionId: world.productionId, scorePartId: alto!, octaveShift: 0 }));
    expect((await linesIn(confirmed.numberId))[0]).toMatchObject({ low: "G♯4", high: "B5" });
    const typed = {
      productionId: world.productionId,
      roleId: standing,
      numberId: confirmed.numberId,
      low: "E3",
      high: "A4",
    };
    expect(await writeLine(typed)).toMatchObject({ ok: false, error: { code: "refused" } });
    await data(writeLine({ ...typed, replaceRead: true }));
    expect(
      (await linesIn(confirmed.numberId)).filter((line) => line.role === "Second Tenor"),
    ).toMatchObject([{ source: "typed", high: "A4" }]);
  });

  test("a newer file of the same number replaces what was read, keeps roles and casting, and asks for the version", async () => {
    const md = world.people.md.userId;
    const actor = await actorOf(md);
    const old = await scoreReview(
      actor,
      world.productionId,
      (await keep(md, world.productionId)).scoreId,
    );
    const number = old.numbers.find((each) => each.id === old.numberId);
    expect(number?.title).toBe("The Long Day Closes");
    const roleId = number!.lines.find((line) => line.source === "read")!.roleId;
    await db
      .insert(t.choices)
      .values({
        productionId: world.productionId,
        roleId,
        personId: world.people.actor.personId,
        state: "cast",
      });
    const parts = old.parts.map((part) => ({
      scorePartId: part.scorePartId,
      to: part.name === "1st Bass" ? roleId : "leave",
    }));
    const input = confirmation(world.productionId, old.scoreId, parts, {
      numberId: number!.id,
      label: number!.label,
    });
    expect(await confirmReading({ ...input, version: number!.version + 5 })).toMatchObject({
      ok: false,
      error: { code: "stale" },
    });
    expect(await data(confirmReading({ ...input, version: number!.version }))).toMatchObject({
      lines: 1,
      newRoles: 0,
      replaced: 3,
    });
    const lines = await linesIn(number!.id);
    expect(lines.map((line) => [line.roleId === roleId, line.source])).toEqual([
      [false, "typed"],
      [true, "read"],
    ]);
    expect(await db.$count(t.choices, eq(t.choices.roleId, roleId))).toBe(1);
    expect((await db.select().from(t.scores).where(eq(t.scores.id, old.scoreId)))[0]?.version).toBe(
      2,
    );
  });

  test("confirmed twice at the same moment, a reading makes one number", async () => {
    const kept = await keep(
      world.people.md.userId,
      world.productionId,
      "works/beach-fairy-lullaby.mxl",
    );
    const parts = (await partsOf(kept.scoreId)).map((part, index) => ({
      scorePartId: part.id,
      to: part.vocal ? "new" : "leave",
      name: `Fairy ${String(index)}`,
    }));
    const results = await Promise.all([
      confirmReading(
        confirmation(world.productionId, kept.scoreId, parts, {
          label: "30",
          title: "Fairy Lullaby",
        }),
      ),
      confirmReading(
        confirmation(
          world.productionId,
          kept.scoreId,
          parts.map((part) => ({ ...part, name: `${part.name} again` })),
          { label: "31", title: "Fairy Lullaby" },
        ),
      ),
    ]);
    expect(results.filter((result) => result.ok)).toHaveLength(1);
    expect(results.find((result) => !result.ok)).toMatchObject({
      error: { code: "taken", message: expect.stringContaining("Fairy Lullaby") },
    });
    expect(await db.$count(t.numbers, eq(t.numbers.scoreId, kept.scoreId))).toBe(1);
  });

  test("one wrong part and nothing at all is written", async () => {
    const kept = await keep(world.people.md.userId, world.productionId);
    const [first, second, , , piano] = await partsOf(kept.scoreId);
    const before = [
      await db.$count(t.numbers),
      await db.$count(t.roles),
      await db.$count(t.vocalLines),
    ];
    const otherRole = newId();
    await db
      .insert(t.roles)
      .values({ id: otherRole, productionId: world.otherProductionId, name: "Peddler", place: 1 });
    const siblingRole = newId();
    await db
      .insert(t.roles)
      .values({
        id: siblingRole,
        productionId: world.siblingProductionId,
        name: "Marrow",
        place: 1,
      });
    for (const to of [otherRole, siblingRole, newId()]) {
      const input = confirmation(
        world.productionId,
        kept.scoreId,
        [
          { scorePartId: first!.id, to: "new", name: "Newcomer" },
          { scorePartId: second!.id, to },
        ],
        { label: "40" },
      );
      expect(await confirmReading(input)).toMatchObject({
        ok: false,
        error: { code: "not-found" },
      });
    }
    const twice = confirmation(
      world.productionId,
      kept.scoreId,
      [
        { scorePartId: first!.id, to: "new", name: "A" },
        { scorePartId: first!.id, to: "new", name: "B" },
      ],
      { label: "40" },
    );
    expect(await confirmReading(twice)).toMatchObject({ ok: false, error: { code: "not-found" } });
    const named = confirmation(
      world.productionId,
      kept.scoreId,
      [{ scorePartId: first!.id, to: "new", name: "MAREN" }],
      { label: "40" },
    );
    expect(await confirmReading(named)).toMatchObject({
      ok: false,
      error: { fields: { "parts.0.name": expect.any(String) } },
    });
    const foreignPart = confirmation(
      world.productionId,
      kept.scoreId,
      [{ scorePartId: newId(), to: "new", name: "Nobody" }],
      { label: "40" },
    );
    expect(await confirmReading(foreignPart)).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
    const far = confirmation(
      world.productionId,
      kept.scoreId,
      [{ scorePartId: first!.id, to: "new", name: "Far", octaveShift: 9 }],
      { label: "40" },
    );
    expect(await confirmReading(far)).toMatchObject({ ok: false, error: { code: "invalid" } });
    expect(piano).toBeDefined();
    // The two roles are those put in here by hand.
    expect([
      await db.$count(t.numbers),
      await db.$count(t.roles),
      await db.$count(t.vocalLines),
    ]).toEqual([before[0], before[1]! + 2, before[2]]);
  });
});

describe("who may", () => {
  test("only the music team changes the score; whoever reads it is told so, and nobody else hears that it exists", async () => {
    as(world.people.md.userId);
    const [roleId, numberId] = [await makeRole("Keeper"), await makeNumber("90")];
    await data(
      writeLine({ productionId: world.productionId, roleId, numberId, low: "C4", high: "C5" }),
    );
    const lineId = (await linesIn(numberId))[0]!.id;
    const kept = await keep(world.people.md.userId, world.productionId);
    const scorePartId = (await partsOf(kept.scoreId))[0]!.id;
    const id = world.productionId;
    const attempts = [
      () => addNumber(numberInput("91")),
      () => changeNumber({ ...numberInput("90"), numberId, version: 1 }),
      () => moveNumber({ productionId: id, numberId, direction: "up" }),
      () => removeNumber({ productionId: id, numberId }),
      () => restoreNumber({ productionId: id, numberId }),
      () => addRole(roleInput("Someone")),
      () => changeRole({ ...roleInput("Keeper"), roleId, version: 1 }),
      () => removeRole({ productionId: id, roleId }),
      () => restoreRole({ productionId: id, roleId }),
      () => writeLine({ productionId: id, roleId, numberId, low: "C3", high: "C5" }),
      () => removeLine({ productionId: id, lineId }),
      () => shiftPart({ productionId: id, scorePartId, octaveShift: 1 }),
      () =>
        confirmReading(
          confirmation(id, kept.scoreId, [{ scorePartId, to: "leave" }], { label: "92" }),
        ),
    ];
    const expected = {
      stageManager: "not-allowed",
      director: "not-allowed",
      producer: "not-allowed",
      accompanist: "not-allowed",
      actor: "not-allowed",
      admin: "not-allowed",
      siblingMd: "not-found",
      outsiderMd: "not-found",
      outsiderAdmin: "not-found",
    } as const;
    for (const [who, code] of Object.entries(expected)) {
      as(world.people[who as keyof typeof expected].userId);
      for (const attempt of attempts)
        expect(await attempt(), who).toMatchObject({ ok: false, error: { code } });
    }
    as(null);
    for (const attempt of attempts)
      expect(await attempt()).toMatchObject({ ok: false, error: { code: "signed-out" } });
    expect(await linesIn(numberId)).toMatchObject([{ low: "C4", high: "C5" }]);
    as(world.people.assistant.userId);
    expect(
      await writeLine({ productionId: id, roleId, numberId, low: "B3", high: "C5" }),
    ).toMatchObject({ ok: true });
  });

  test("readers read, others do not", async () => {
    for (const who of [
      "md",
      "assistant",
      "stageManager",
      "director",
      "choreographer",
      "producer",
      "admin",
    ] as const) {
      expect(
        (await readScoreView(await actorOf(world.people[who].userId), world.productionId))
          .mayChange,
      ).toBe(who === "md" || who === "assistant");
    }
    for (const who of ["accompanist", "actor"] as const) {
      await expect(
        roleVoices(await actorOf(world.people[who].userId), world.productionId),
      ).rejects.toMatchObject({ code: "not-allowed" });
      await expect(
        readScoreView(await actorOf(world.people[who].userId), world.productionId),
      ).rejects.toMatchObject({ code: "not-allowed" });
    }
    for (const who of ["siblingMd", "outsiderMd"] as const) {
      await expect(
        numbersOf(await actorOf(world.people[who].userId), world.productionId),
      ).rejects.toMatchObject({ code: "not-found" });
    }
    const kept = await keep(world.people.md.userId, world.productionId, LONG_DAY);
    await expect(
      scoreReview(await actorOf(world.people.director.userId), world.productionId, kept.scoreId),
    ).rejects.toMatchObject({ code: "not-allowed" });
  });

  test("an id of another company or production inside an otherwise valid request is not there", async () => {
    const [foreignNumber, foreignRole, foreignLine] = [newId(), newId(), newId()];
    await db
      .insert(t.numbers)
      .values({
        id: foreignNumber,
        productionId: world.otherProductionId,
        label: "1",
        title: "Fair",
        place: 1,
      });
    await db
      .insert(t.roles)
      .values({
        id: foreignRole,
        productionId: world.otherProductionId,
        name: "Ringmaster",
        place: 1,
      });
    await db
      .insert(t.vocalLines)
      .values({
        id: foreignLine,
        roleId: foreignRole,
        numberId: foreignNumber,
        source: "typed",
        low: 60,
        high: 72,
        lowSpelled: "C4",
        highSpelled: "C5",
      });
    const theirs = await keep(
      world.people.outsiderMd.userId,
      world.otherProductionId,
      "works/beach-fairy-lullaby.mxl",
    );
    const theirPart = (await partsOf(theirs.scoreId))[0]!.id;
    as(world.people.md.userId);
    const [roleId, numberId] = [await makeRole("Own"), await makeNumber("95")];
    const id = world.productionId;
    const notThere = { ok: false, error: { code: "not-found" } };
    expect(
      await writeLine({ productionId: id, roleId: foreignRole, numberId, low: "C4", high: "C5" }),
    ).toMatchObject(notThere);
    expect(
      await writeLine({ productionId: id, roleId, numberId: foreignNumber, low: "C4", high: "C5" }),
    ).toMatchObject(notThere);
    expect(await removeLine({ productionId: id, lineId: foreignLine })).toMatchObject(notThere);
    expect(await removeNumber({ productionId: id, numberId: foreignNumber })).toMatchObject(
      notThere,
    );
    expect(await restoreNumber({ productionId: id, numberId: foreignNumber })).toMatchObject(
      notThere,
    );
    expect(
      await moveNumber({ productionId: id, numberId: foreignNumber, direction: "up" }),
    ).toMatchObject(notThere);
    expect(
      await changeNumber({ ...numberInput("96"), numberId: foreignNumber, version: 1 }),
    ).toMatchObject(notThere);
    expect(await removeRole({ productionId: id, roleId: foreignRole })).toMatchObject(notThere);
    expect(await restoreRole({ productionId: id, roleId: foreignRole })).toMatchObject(notThere);
    expect(
      await changeRole({ ...roleInput("Mine"), roleId: foreignRole, version: 1 }),
    ).toMatchObject(notThere);
    expect(
      await shiftPart({ productionId: id, scorePartId: theirPart, octaveShift: -1 }),
    ).toMatchObject(notThere);
    expect(
      await confirmReading(
        confirmation(id, theirs.scoreId, [{ scorePartId: theirPart, to: "leave" }], {
          label: "97",
        }),
      ),
    ).toMatchObject(notThere);
    await expect(
      scoreReview(await actorOf(world.people.md.userId), id, theirs.scoreId),
    ).rejects.toMatchObject({ code: "not-found" });
    expect(
      await db.$count(
        t.vocalLines,
        and(eq(t.vocalLines.id, foreignLine), eq(t.vocalLines.low, 60)),
      ),
    ).toBe(1);
  });
});
