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
import { readScoreView } from "@/lib/data/score/page";
import { scoreReview } from "@/lib/data/score/review";
import { numbersOf, roleVoices } from "@/lib/data/score/voices";
import { as } from "../helpers/as";
import {
  LONG_DAY,
  actorOf,
  confirmation,
  data,
  keep,
  linesIn,
  makeNumber,
  makeRole,
  numberInput,
  partsOf,
  roleInput,
} from "../helpers/score";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
beforeAll(async () => {
  world = await makeWorld();
});

describe("who may", () => {
  test("only the music team changes the score; whoever reads it is told so, and nobody else hears that it exists", async () => {
    as(world.people.md.userId);
    const [roleId, numberId] = [
      await makeRole(world.productionId, "Keeper"),
      await makeNumber(world.productionId, "90"),
    ];
    await data(
      writeLine({ productionId: world.productionId, roleId, numberId, low: "C4", high: "C5" }),
    );
    const lineId = (await linesIn(numberId))[0]!.id;
    const kept = await keep(world.people.md.userId, world.productionId);
    const scorePartId = (await partsOf(kept.scoreId))[0]!.id;
    const id = world.productionId;
    const attempts = [
      () => addNumber(numberInput(world.productionId, "91")),
      () => changeNumber({ ...numberInput(world.productionId, "90"), numberId, version: 1 }),
      () => moveNumber({ productionId: id, numberId, direction: "up" }),
      () => removeNumber({ productionId: id, numberId }),
      () => restoreNumber({ productionId: id, numberId }),
      () => addRole(roleInput(world.productionId, "Someone")),
      () => changeRole({ ...roleInput(world.productionId, "Keeper"), roleId, version: 1 }),
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
    await db.insert(t.numbers).values({
      id: foreignNumber,
      productionId: world.otherProductionId,
      label: "1",
      title: "Fair",
      place: 1,
    });
    await db.insert(t.roles).values({
      id: foreignRole,
      productionId: world.otherProductionId,
      name: "Ringmaster",
      place: 1,
    });
    await db.insert(t.vocalLines).values({
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
    const [roleId, numberId] = [
      await makeRole(world.productionId, "Own"),
      await makeNumber(world.productionId, "95"),
    ];
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
      await changeNumber({
        ...numberInput(world.productionId, "96"),
        numberId: foreignNumber,
        version: 1,
      }),
    ).toMatchObject(notThere);
    expect(await removeRole({ productionId: id, roleId: foreignRole })).toMatchObject(notThere);
    expect(await restoreRole({ productionId: id, roleId: foreignRole })).toMatchObject(notThere);
    expect(
      await changeRole({
        ...roleInput(world.productionId, "Mine"),
        roleId: foreignRole,
        version: 1,
      }),
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
