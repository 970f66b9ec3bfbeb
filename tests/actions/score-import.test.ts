import { eq } from "drizzle-orm";
import { beforeAll, describe, expect, test } from "vitest";
import {
  confirmReading,
  shiftPart,
  writeLine,
} from "@/app/(season)/productions/[productionId]/score/actions";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import * as t from "@/db/schema";
import { readScoreView } from "@/lib/data/score/page";
import { scoreReview } from "@/lib/data/score/review";
import { numbersOf, roleVoices } from "@/lib/data/score/voices";
import { as } from "../helpers/as";
import { actorOf, confirmation, data, keep, linesIn, makeRole, partsOf } from "../helpers/score";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
beforeAll(async () => {
  world = await makeWorld();
});

describe("a score read in", () => {
  beforeAll(async () => {
    as(world.people.md.userId);
    await makeRole(world.productionId, "Maren");
  });

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
    const standing = await makeRole(world.productionId, "Second Tenor");
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
    await db.insert(t.choices).values({
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
    await db.insert(t.roles).values({
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
