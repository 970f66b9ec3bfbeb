import { readFile } from "node:fs/promises";
import path from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import { GET as openapi } from "@/app/api/v1/openapi.json/route";
import { POST as rangeFit } from "@/app/api/v1/range-fit/route";
import { POST as vocalLines } from "@/app/api/v1/vocal-lines/route";
import { createTokenByEmail, listTokens, revokeToken } from "@/lib/data/tokens";
import { loadActor } from "@/lib/data/actor";
import { rangeFitResponse, vocalLinesResponse } from "@/lib/schemas/api";
import { buildWorkers } from "../../scripts/build-workers.mjs";
import { as } from "../helpers/as";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
let token: string;
beforeAll(async () => {
  world = await makeWorld();
  token = await createTokenByEmail(world.people.md.email);
  await buildWorkers();
});

const post = (url: string, body: BodyInit, headers: Record<string, string> = {}) =>
  new Request(`http://localhost:3000/api/v1/${url}`, {
    method: "POST",
    body,
    headers: { authorization: `Bearer ${token}`, ...headers },
  });

const music = (file: string) => path.join(import.meta.dirname, "../../db/seed/music", file);

async function upload(file: string, name = path.basename(file)): Promise<Response> {
  const form = new FormData();
  form.set("file", new File([new Uint8Array(await readFile(file))], name));
  return vocalLines(post("vocal-lines", form));
}

describe("POST /range-fit", () => {
  test("answers with the figures of Herbst et al. (2012) and nothing besides", async () => {
    // From transposition-examples.json (see tests/fixtures/music): "The Lost Chord" C4–F5 for a low voice A3–D5.
    const response = await rangeFit(
      post(
        "range-fit",
        JSON.stringify({ singer: { low: 57, high: 74 }, line: { low: 60, high: 77 } }),
      ),
    );
    expect(response.status).toBe(200);
    const body = await response.json();
    expect(rangeFitResponse.strict().parse(body)).toMatchObject({
      verdict: "out",
      shortBelow: 0,
      shortAbove: 3,
      lowerReserve: 3,
      upperReserve: -3,
      tessituraShift: 3,
    });
  });

  test.each([
    ["not JSON", "{", 400, "request.not-json"],
    [
      "not the form",
      JSON.stringify({ singer: { low: "C4", high: 74 }, line: { low: 60, high: 77 } }),
      400,
      "request.invalid",
    ],
    [
      "low above high",
      JSON.stringify({ singer: { low: 80, high: 74 }, line: { low: 60, high: 77 } }),
      400,
      "request.invalid",
    ],
    ["too large", JSON.stringify({ pad: "x".repeat(1_100_000) }), 413, "request.too-large"],
  ])("refuses what is %s", async (_what, body, status, code) => {
    const response = await rangeFit(post("range-fit", body));
    expect(response.status).toBe(status);
    expect(await response.json()).toMatchObject({ error: { code } });
  });
});

describe("POST /vocal-lines", () => {
  test("reads a public-domain partsong with the reference ranges", async () => {
    // Reference: expected.json beside the score in tests/fixtures/music (independent parser, cross-checked with two importers).
    const response = await upload(music("sullivan-the-long-day-closes.mxl"));
    expect(response.status).toBe(200);
    const body = vocalLinesResponse.strict().parse(await response.json());
    expect(body.measures).toEqual({ written: 67, performed: 67 });
    const sung = body.parts.slice(0, 4).map((p) => [p.low?.midi, p.high?.midi]);
    expect(sung).toEqual([
      [68, 83],
      [52, 68],
      [44, 62],
      [40, 59],
    ]);
    expect(body.parts[0]?.written).toMatchObject({
      quarters: 187.5,
      attacks: 179,
      p25: 73,
      p75: 78,
    });
  });

  test("refuses another kind of file, a missing file and no multipart, each in words", async () => {
    expect(await (await upload(music("README.md"))).json()).toMatchObject({
      error: { code: "score.not-musicxml", path: "file" },
    });
    expect((await upload(music("README.md"))).status).toBe(415);
    expect((await vocalLines(post("vocal-lines", new FormData()))).status).toBe(400);
    expect(
      (await vocalLines(post("vocal-lines", "{}", { "content-type": "application/json" }))).status,
    ).toBe(415);
  });
});

describe("tokens", () => {
  test("without a token, with a wrong one and with a revoked one nothing is answered", async () => {
    const body = JSON.stringify({ singer: { low: 57, high: 74 }, line: { low: 60, high: 77 } });
    const bare = new Request("http://localhost:3000/api/v1/range-fit", { method: "POST", body });
    expect((await rangeFit(bare)).status).toBe(401);
    expect(
      (await rangeFit(post("range-fit", body, { authorization: "Bearer cem_wrong" }))).status,
    ).toBe(401);
    const actor = await loadActor(world.people.admin.userId);
    if (!actor) throw new Error("no such login");
    const other = await createTokenByEmail(world.people.admin.email);
    const [listed] = await listTokens(actor);
    expect(
      (await rangeFit(post("range-fit", body, { authorization: `Bearer ${other}` }))).status,
    ).toBe(200);
    await revokeToken(actor, listed?.id ?? "");
    expect(
      (await rangeFit(post("range-fit", body, { authorization: `Bearer ${other}` }))).status,
    ).toBe(401);
  });

  test("the session cookie serves as well, from our own pages only", async () => {
    as(world.people.md.userId);
    const body = JSON.stringify({ singer: { low: 57, high: 74 }, line: { low: 60, high: 77 } });
    const own = new Request("http://localhost:3000/api/v1/range-fit", {
      method: "POST",
      body,
      headers: { origin: "http://localhost:3000", host: "localhost:3000" },
    });
    expect((await rangeFit(own)).status).toBe(200);
    for (const origin of ["https://elsewhere.example", "null"]) {
      const foreign = new Request("http://localhost:3000/api/v1/range-fit", {
        method: "POST",
        body,
        headers: { origin, host: "localhost:3000" },
      });
      expect((await rangeFit(foreign)).status).toBe(403);
    }
  });
});

test("the description lists every route there is, with its forms", async () => {
  const body = (await openapi().json()) as { openapi: string; paths: Record<string, unknown> };
  expect(body.openapi).toBe("3.1.0");
  expect(Object.keys(body.paths).sort()).toEqual(["/range-fit", "/vocal-lines"]);
  expect(JSON.stringify(body)).toContain("tessituraShift");
});
