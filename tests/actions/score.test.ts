import { eq } from "drizzle-orm";
import { beforeAll, describe, expect, test } from "vitest";
import {
  addNumber,
  addRole,
  changeNumber,
  changeRole,
  moveNumber,
  removeLine,
  removeNumber,
  removeRole,
  restoreNumber,
  restoreRole,
  writeLine,
} from "@/app/(season)/productions/[productionId]/score/actions";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import * as t from "@/db/schema";
import { numbersOf, roleVoices, roleVoicesIn } from "@/lib/data/score/voices";
import { as } from "../helpers/as";
import {
  actorOf,
  data,
  linesIn,
  makeNumber,
  makeRole,
  numberInput,
  roleInput,
} from "../helpers/score";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
beforeAll(async () => {
  world = await makeWorld();
});

describe("numbers", () => {
  test("are added, changed, moved, removed and put back by the music director", async () => {
    as(world.people.md.userId);
    const first = await makeNumber(world.productionId, "1");
    const second = await makeNumber(world.productionId, "2");
    expect(
      await changeNumber({
        ...numberInput(world.productionId, "1a", "Low Water"),
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
      Array.from({ length: 10 }, () => addNumber(numberInput(world.productionId, "77"))),
    );
    expect(results.filter((result) => result.ok)).toHaveLength(1);
    expect(results.find((result) => !result.ok)).toMatchObject({
      error: { code: "invalid", fields: { label: expect.stringContaining("77") } },
    });
    const gone = await makeNumber(world.productionId, "78");
    await data(removeNumber({ productionId: world.productionId, numberId: gone }));
    await makeNumber(world.productionId, "78");
    expect(await restoreNumber({ productionId: world.productionId, numberId: gone })).toMatchObject(
      { ok: false, error: { code: "invalid" } },
    );
  });

  test("what cannot be read is said beside its field", async () => {
    as(world.people.md.userId);
    const bad = {
      ...numberInput(world.productionId, "", ""),
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
    const numberId = await makeNumber(world.productionId, "5");
    const change = { ...numberInput(world.productionId, "5", "A"), numberId, version: 1 };
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
    const roleId = await makeRole(world.productionId, "Maren");
    expect(await addRole(roleInput(world.productionId, " maren "))).toMatchObject({
      ok: false,
      error: { fields: { name: expect.any(String) } },
    });
    await data(
      changeRole({
        ...roleInput(world.productionId, "Maren"),
        roleId,
        version: 1,
        kind: "ensemble",
        needed: "14",
        covers: "2",
      }),
    );
    expect(
      await changeRole({ ...roleInput(world.productionId, "Maren"), roleId, version: 1 }),
    ).toMatchObject({
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
      await changeRole({
        ...roleInput(world.productionId, "Maren"),
        roleId,
        version: 2,
        needed: "0",
      }),
    ).toMatchObject({ ok: false, error: { fields: { needed: expect.any(String) } } });
  });

  test("a line is typed as notes, typed over, and removed", async () => {
    as(world.people.md.userId);
    const [roleId, numberId] = [
      await makeRole(world.productionId, "Ansel"),
      await makeNumber(world.productionId, "10"),
    ];
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
