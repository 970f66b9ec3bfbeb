import { readdirSync } from "node:fs";
import path from "node:path";
import { eq } from "drizzle-orm";
import { strToU8, zipSync } from "fflate";
import { beforeAll, beforeEach, describe, expect, test } from "vitest";
import { POST } from "@/app/api/productions/[productionId]/score/route";
import { db } from "@/db/client";
import * as t from "@/db/schema";
import { env } from "@/lib/env";
import { as } from "../helpers/as";
import { LONG_DAY, keep, music, partsOf, sha256, upload } from "../helpers/score";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
beforeAll(async () => {
  world = await makeWorld();
});
beforeEach(async () => {
  await db.delete(t.rateCounters).where(eq(t.rateCounters.hits, t.rateCounters.hits));
});

function storedFiles(): number {
  try {
    return readdirSync(path.resolve(env().STORAGE_DIR), {
      recursive: true,
      withFileTypes: true,
    }).filter((entry) => entry.isFile()).length;
  } catch {
    return 0;
  }
}

/** How much of anything an upload could write there is. */
async function everything() {
  const tables = [t.files, t.scores, t.scoreParts, t.numbers, t.roles, t.vocalLines];
  const counts = await Promise.all(tables.map((table) => db.$count(table)));
  return [...counts, storedFiles()];
}

async function refusal(
  response: Response,
): Promise<{ status: number; code: string; message: string }> {
  const body = (await response.json()) as { error: { code: string; message: string } };
  return { status: response.status, ...body.error };
}

describe("a score that can be read", () => {
  // Ranges: an independent parser in Python, in agreement with verovio 6.3.0 and MuseScore 3.2.3 (tests/fixtures/music/README.md).
  test("is kept with its hash and its parts as written, and changes no number, role or line", async () => {
    const bytes = music(LONG_DAY);
    const kept = await keep(world.people.md.userId, world.productionId);
    expect(kept).toMatchObject({
      sha256: sha256(bytes),
      bytes: bytes.length,
      title: "The Long Day Closes",
    });
    const parts = await partsOf(kept.scoreId);
    expect(parts.map((part) => [part.name, part.vocal, part.lowSpelled, part.highSpelled])).toEqual(
      [
        ["Alto (or 1st Tenor)", true, "G♯4", "B5"],
        ["2nd Tenor", true, "E3", "G♯4"],
        ["1st Bass", true, "G♯2", "D4"],
        ["2nd Bass", true, "E2", "B3"],
        ["Piano", false, expect.anything(), expect.anything()],
      ],
    );
    const [file] = await db.select().from(t.files).where(eq(t.files.id, kept.fileId));
    expect(file).toMatchObject({
      productionId: world.productionId,
      companyId: world.companyId,
      kind: "score",
      sha256: sha256(bytes),
      bytes: bytes.length,
      mediaType: "application/vnd.recordare.musicxml",
      name: "sullivan-the-long-day-closes.mxl",
    });
    expect(await db.$count(t.numbers)).toBe(0);
    expect(await db.$count(t.roles)).toBe(0);
    expect(await db.$count(t.vocalLines)).toBe(0);
  });

  test("is known by its content, whatever it is called", async () => {
    as(world.people.md.userId);
    const plain = await upload(
      world.productionId,
      music("hostile/ok-plain-xml-named.mxl"),
      "number.mxl",
    );
    const packed = await upload(
      world.productionId,
      music("hostile/ok-zip-named.musicxml"),
      "number.musicxml",
    );
    expect([plain.status, packed.status]).toEqual([200, 200]);
  });

  test("two at once are two readings, each whole", async () => {
    const [first, second] = await Promise.all([
      keep(world.people.md.userId, world.productionId),
      keep(world.people.md.userId, world.productionId),
    ]);
    expect(first.scoreId).not.toBe(second.scoreId);
    expect(first.sha256).toBe(second.sha256);
    expect((await partsOf(first.scoreId)).length).toBe(5);
    expect((await partsOf(second.scoreId)).length).toBe(5);
  });
});

describe("what cannot be read is refused in plain words, and nothing is kept", () => {
  // Made here: 200 MB of spaces pack into 200 kB.
  const bomb = () => {
    const start = strToU8("<score-partwise>");
    const music = new Uint8Array(200 * 1024 * 1024).fill(0x20);
    music.set(start);
    return new Uint8Array(zipSync({ "score.musicxml": music }));
  };
  const cases: [string, () => Uint8Array<ArrayBuffer>, number, RegExp][] = [
    ["a bomb of 200 MB", bomb, 413, /32 MB/],
    [
      "a bomb that lies about its size",
      () => music("hostile/zip-bomb-lying-size.mxl"),
      413,
      /32 MB/,
    ],
    ["entities", () => music("hostile/billion-laughs.musicxml"), 422, /\w/],
    ["a web page", () => music("hostile/html-root.musicxml"), 415, /MusicXML/],
    ["a torn file", () => music("hostile/truncated.musicxml"), 422, /again/i],
    ["nothing", () => new Uint8Array(), 422, /empty/],
    ["a song collection", () => music("hostile/opus-root.musicxml"), 422, /\w/],
    ["more than 20 MB", () => new Uint8Array(20 * 1024 * 1024 + 1), 413, /20 MB/],
  ];
  test.each(cases)("%s", async (_, bytes, status, words) => {
    as(world.people.md.userId);
    const before = await everything();
    const answer = await refusal(await upload(world.productionId, bytes(), "score.mxl"));
    expect(answer.status).toBe(status);
    expect(answer.message).toMatch(words);
    expect(answer.message).not.toMatch(/Error|undefined|at \//);
    expect(await everything()).toEqual(before);
  });

  test("a file that changed on the way", async () => {
    as(world.people.md.userId);
    const before = await everything();
    const answer = await refusal(
      await upload(world.productionId, music(LONG_DAY), "a.mxl", { sha256: "0".repeat(64) }),
    );
    expect(answer).toMatchObject({
      status: 422,
      message: expect.stringContaining("did not arrive whole"),
    });
    expect(await everything()).toEqual(before);
  });

  test("a form without a file, and a body that is no form", async () => {
    as(world.people.md.userId);
    const address = `http://localhost:3000/api/productions/${world.productionId}/score`;
    const context = { params: Promise.resolve({ productionId: world.productionId }) };
    const empty = await POST(
      new Request(address, { method: "POST", body: new FormData() }),
      context,
    );
    const json = await POST(
      new Request(address, {
        method: "POST",
        body: "{}",
        headers: { "content-type": "application/json" },
      }),
      context,
    );
    expect([(await refusal(empty)).code, (await refusal(json)).code]).toEqual([
      "invalid",
      "invalid",
    ]);
  });
});

describe("who may", () => {
  test.each([
    "stageManager",
    "director",
    "choreographer",
    "producer",
    "accompanist",
    "actor",
    "admin",
  ] as const)("not: %s", async (who) => {
    as(world.people[who].userId);
    const before = await everything();
    expect((await refusal(await upload(world.productionId, music(LONG_DAY), "a.mxl"))).code).toBe(
      "not-allowed",
    );
    expect(await everything()).toEqual(before);
  });

  test("for another company, another production's music director and an id that is none, the production is not there", async () => {
    for (const who of ["outsiderMd", "outsiderAdmin", "siblingMd"] as const) {
      as(world.people[who].userId);
      expect(
        (await refusal(await upload(world.productionId, music(LONG_DAY), "a.mxl"))).status,
      ).toBe(404);
    }
    as(world.people.md.userId);
    expect((await refusal(await upload("nonsense", music(LONG_DAY), "a.mxl"))).status).toBe(404);
    as(null);
    expect((await refusal(await upload(world.productionId, music(LONG_DAY), "a.mxl"))).status).toBe(
      401,
    );
  });

  test("the assistant music director may", async () => {
    expect(
      await keep(
        world.people.assistant.userId,
        world.productionId,
        "works/beach-fairy-lullaby.mxl",
      ),
    ).toMatchObject({ title: expect.any(String) });
  });

  test("not from another site's page", async () => {
    as(world.people.md.userId);
    const form = new FormData();
    form.set("file", new Blob([music(LONG_DAY)]), "a.mxl");
    const request = new Request("http://localhost:3000/api", {
      method: "POST",
      body: form,
      headers: { "sec-fetch-site": "cross-site" },
    });
    const response = await POST(request, {
      params: Promise.resolve({ productionId: world.productionId }),
    });
    expect(response.status).toBe(403);
  });
});
