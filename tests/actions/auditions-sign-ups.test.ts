import { and, eq, like } from "drizzle-orm";
import { readFile } from "node:fs/promises";
import { beforeAll, describe, expect, test } from "vitest";
import {
  addSinger,
  changeSignUp,
  hearRange,
  importSingers,
  relistSignUp,
  withdrawSignUp,
} from "@/app/(season)/productions/[productionId]/auditions/actions";
import { db } from "@/db/client";
import * as t from "@/db/schema";
import { loadActor } from "@/lib/data/actor";
import { previewImport } from "@/lib/data/auditions/import-singers";
import { listSignUps } from "@/lib/data/auditions/sign-ups";
import { as } from "../helpers/as";
import { makeSignUps } from "../helpers/audition-day";
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

const sheet = async (name: string) => ({
  name,
  bytes: new Uint8Array(await readFile(new URL(`../fixtures/sheets/${name}`, import.meta.url))),
});

describe("a list of singers", () => {
  test.each(["singers.csv", "singers.xlsx", "singers-libreoffice.xlsx"])(
    "%s: 40 good rows, 3 bad ones with their reasons",
    async (name) => {
      const preview = await previewImport(
        await actorOf(world.people.md.userId),
        world.productionId,
        await sheet(name),
      );
      const bad = preview.rows.filter((row) => row.becomes === "problem");
      // What is in the files is written down beside them (tests/fixtures/sheets/README.md): 40 singers, mistakes in lines 22–24.
      expect(preview.rows).toHaveLength(43);
      expect(bad.map((row) => row.line)).toEqual([22, 23, 24]);
      for (const row of bad) expect(row.problems.length).toBeGreaterThan(0);
      expect(preview.unknownColumns).toEqual(["Shoe size"]);
      expect(
        new Set(preview.rows.filter((row) => row.becomes !== "problem").map((row) => row.becomes)),
      ).toEqual(new Set(["new person"]));
    },
  );

  test("the good rows go in once: people, positions, ranges, and places in the sheet's order", async () => {
    const actor = await actorOf(world.people.md.userId);
    as(world.people.md.userId);
    const preview = await previewImport(actor, world.productionId, await sheet("singers.csv"));
    const rows = preview.rows.filter((row) => row.problems.length === 0).map((row) => row.values);
    expect(await importSingers({ productionId: world.productionId, rows })).toEqual({
      ok: true,
      data: { added: 40, newPeople: 40, already: 0 },
    });
    expect(await importSingers({ productionId: world.productionId, rows })).toEqual({
      ok: true,
      data: { added: 0, newPeople: 0, already: 40 },
    });

    const listed = await listSignUps(actor, world.productionId);
    expect(listed).toHaveLength(40);
    expect(listed.map((row) => row.name)).toEqual(rows.map((row) => row.name));
    expect(listed.map((row) => row.place)).toEqual(rows.map((_, index) => index + 1));
    // The first row of the file: C4 to A5, MIDI 60 and 81 (C4 = 60 as in the MIDI standard's middle C).
    expect(listed[0]).toMatchObject({
      name: "Adaeze Holmgren",
      range: { low: 60, high: 81, kind: "claimed" },
      bars: 16,
      notBefore: "10:30",
      state: "listed",
      slot: null,
    });
    const positions = await db
      .select()
      .from(t.positions)
      .innerJoin(t.people, eq(t.people.id, t.positions.personId))
      .where(and(eq(t.positions.kind, "actor"), like(t.people.email, "%@singers.example")));
    expect(positions).toHaveLength(40);
    const again = await previewImport(actor, world.productionId, await sheet("singers.xlsx"));
    expect(
      new Set(again.rows.filter((row) => row.becomes !== "problem").map((row) => row.becomes)),
    ).toEqual(new Set(["signed up"]));
  });

  test("imported twice at the same moment, everybody is in once", async () => {
    as(world.people.md.userId);
    const rows = Array.from({ length: 12 }, (_, i) => ({
      name: `Twin ${String(i)}`,
      email: `twin.${String(i)}@singers.example`,
    }));
    const results = await Promise.all(
      Array.from({ length: 5 }, () => importSingers({ productionId: world.productionId, rows })),
    );
    expect(results.some((result) => result.ok)).toBe(true);
    const listed = await listSignUps(await actorOf(world.people.md.userId), world.productionId);
    const twins = listed.filter((row) => row.name.startsWith("Twin"));
    expect(twins).toHaveLength(12);
    expect(new Set(listed.map((row) => row.place)).size).toBe(listed.length);
  });

  test("a known person of the company keeps their name and is said to be known; another company's record is not touched", async () => {
    const known = world.people.siblingMd;
    const text = new TextEncoder().encode(
      `Name,E-mail\nSomeone Else,${known.email}\nLucan,${world.people.outsiderMd.email}\n`,
    );
    const preview = await previewImport(await actorOf(world.people.md.userId), world.productionId, {
      bytes: text,
      name: "two.csv",
    });
    expect(preview.rows.map((row) => [row.becomes, row.knownAs])).toEqual([
      ["known person", known.name],
      ["new person", null],
    ]);
  });

  test("rows are checked again on the server, not believed", async () => {
    as(world.people.md.userId);
    const row = { name: "Low Note", email: "low.note@singers.example" };
    expect(
      await importSingers({
        productionId: world.productionId,
        rows: [{ ...row, email: "nowhere" }],
      }),
    ).toMatchObject({ ok: false, error: { code: "invalid" } });
    expect(
      await importSingers({
        productionId: world.productionId,
        rows: [{ ...row, low: 81, high: 60 }],
      }),
    ).toMatchObject({ ok: false, error: { code: "invalid" } });
    expect(
      await importSingers({
        productionId: world.productionId,
        rows: [{ ...row, low: 2, high: 60 }],
      }),
    ).toMatchObject({ ok: false, error: { code: "invalid" } });
  });

  test("a file that is no spreadsheet, too large or empty says what to do", async () => {
    const actor = await actorOf(world.people.md.userId);
    const preview = (bytes: Uint8Array, name: string) =>
      previewImport(actor, world.productionId, { bytes, name });
    await expect(
      preview(new Uint8Array([0x25, 0x50, 0x44, 0x46]), "list.pdf"),
    ).rejects.toMatchObject({ code: "wrong-kind" });
    await expect(preview(new Uint8Array(2 * 1024 * 1024 + 1), "list.csv")).rejects.toMatchObject({
      code: "too-large",
    });
    await expect(
      preview(new TextEncoder().encode("Name,E-mail\n"), "list.csv"),
    ).rejects.toMatchObject({ code: "refused" });
  });
});

describe("one singer", () => {
  test("is added by form, with notes as people write them, and not twice", async () => {
    as(world.people.stageManager.userId);
    const form = {
      productionId: world.productionId,
      name: "Ines Halloran",
      email: "Ines.H@people.example",
      low: "A3",
      high: "E5",
      bars: "32",
      notBefore: "15:30",
      notAfter: "",
    };
    const added = await addSinger(form);
    expect(added).toMatchObject({ ok: true });
    const listed = await listSignUps(await actorOf(world.people.md.userId), world.productionId);
    // A3 = MIDI 57, E5 = MIDI 76, counted from C4 = 60.
    expect(listed.at(-1)).toMatchObject({
      email: "ines.h@people.example",
      range: { low: 57, high: 76 },
      bars: 32,
      notBefore: "15:30",
      notAfter: null,
    });
    expect(await addSinger(form)).toMatchObject({
      ok: false,
      error: {
        code: "taken",
        fields: { email: "This person is signed up already. Look for them in the list." },
      },
    });
    expect(await addSinger({ ...form, email: "x@people.example", low: "H9" })).toMatchObject({
      ok: false,
      error: { code: "invalid", fields: { low: expect.stringContaining("A3") as string } },
    });
  });

  test("is changed on fresh ground only, withdrawn, and put back", async () => {
    const [signUpId] = await makeSignUps(world, 1, "one");
    if (!signUpId) throw new Error("no sign-up");
    const change = {
      productionId: world.productionId,
      signUpId,
      version: 1,
      song: "The Lost Chord",
      bars: "16",
      asksFor: "",
      notBefore: "",
      notAfter: "12:00",
    };
    expect(await changeSignUp(change)).toMatchObject({ ok: true });
    expect(await changeSignUp(change)).toMatchObject({ ok: false, error: { code: "stale" } });
    const which = { productionId: world.productionId, signUpId };
    expect(await withdrawSignUp(which)).toMatchObject({ ok: true });
    expect(await relistSignUp(which)).toMatchObject({ ok: true });
    expect(await relistSignUp(which)).toMatchObject({ ok: false, error: { code: "stale" } });
    as(world.people.siblingMd.userId);
    expect(
      await withdrawSignUp({ ...which, productionId: world.siblingProductionId }),
    ).toMatchObject({ ok: false, error: { code: "not-found" } });
  });

  test("contacts are shown to those who may see them", async () => {
    const shown = await listSignUps(
      await actorOf(world.people.stageManager.userId),
      world.productionId,
    );
    expect(shown.some((row) => row.email !== null)).toBe(true);
    const table = await listSignUps(
      await actorOf(world.people.director.userId),
      world.productionId,
    );
    expect(table).toHaveLength(shown.length);
    expect(table.every((row) => row.email === null)).toBe(true);
    for (const person of [world.people.actor, world.people.accompanist, world.people.admin]) {
      await expect(
        listSignUps(await actorOf(person.userId), world.productionId),
        person.name,
      ).rejects.toMatchObject({ code: "not-allowed" });
    }
    await expect(
      listSignUps(await actorOf(world.people.outsiderMd.userId), world.productionId),
    ).rejects.toMatchObject({ code: "not-found" });
  });
});

describe("the range heard", () => {
  test("is written by the music team or the table and counts before the claimed one", async () => {
    const [signUpId] = await makeSignUps(world, 1, "heard", { low: 57, high: 76 });
    const actor = await actorOf(world.people.director.userId);
    const listed = (await listSignUps(actor, world.productionId)).find(
      (row) => row.id === signUpId,
    );
    if (!listed) throw new Error("not listed");
    const heard = {
      productionId: world.productionId,
      personId: listed.personId,
      low: 55,
      high: 79,
      comfortableLow: null,
      comfortableHigh: null,
    };
    as(world.people.director.userId);
    expect(await hearRange(heard)).toMatchObject({ ok: true });
    const after = (await listSignUps(actor, world.productionId)).find((row) => row.id === signUpId);
    expect(after?.range).toEqual({ low: 55, high: 79, kind: "heard" });
    for (const person of [
      world.people.stageManager,
      world.people.accompanist,
      world.people.actor,
    ]) {
      as(person.userId);
      expect(await hearRange(heard), person.name).toMatchObject({
        ok: false,
        error: { code: "not-allowed" },
      });
    }
    as(world.people.outsiderMd.userId);
    expect(await hearRange(heard)).toMatchObject({ ok: false, error: { code: "not-found" } });
  });
});
