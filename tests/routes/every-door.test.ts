import { readdirSync, readFileSync } from "node:fs";
import path from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import { buildWorkers } from "../../scripts/build-workers.mjs";
import { as } from "../helpers/as";
import { DOORS } from "../helpers/doors";
import type { Door } from "../helpers/doors";
import { PERSONAS } from "../helpers/personas";
import type { Persona } from "../helpers/personas";
import { makeRichWorld } from "../helpers/rich-world";
import type { RichWorld } from "../helpers/rich-world";

// Every server action and every route handler of the product, called as every position and as nobody. A door that is not
// in the table fails the first test: whoever adds one has to say who may pass.

const root = path.join(import.meta.dirname, "../..");
const METHODS = ["GET", "POST", "PUT", "PATCH", "DELETE"];

function doorsInTheTree(): string[] {
  const files = readdirSync(path.join(root, "app"), { recursive: true, encoding: "utf8" })
    .map((file) => `app/${file.split(path.sep).join("/")}`)
    .filter((file) => file.endsWith("/actions.ts") || file.endsWith("/route.ts"));
  return files.flatMap((file) => {
    const source = readFileSync(path.join(root, file), "utf8");
    const names = [...source.matchAll(/export (?:const|async function|function) (\w+)/g)].map(
      (m) => m[1] ?? "",
    );
    const destructured = [...source.matchAll(/export const \{([^}]+)\}/g)].flatMap((m) =>
      (m[1] ?? "").split(",").map((n) => n.trim()),
    );
    const exported = [...new Set([...names, ...destructured])].filter((name) => name !== "");
    return exported
      .filter((name) => file.endsWith("actions.ts") || METHODS.includes(name))
      .map((name) => `${file}#${name}`);
  });
}

type Called = { refused: boolean; what: string };

async function callDoor(
  door: Door,
  name: string,
  world: RichWorld,
  persona: Persona,
): Promise<Called> {
  const [file = "", exported = ""] = name.split("#");
  const loaded = (await import(/* @vite-ignore */ path.join(root, file))) as Record<
    string,
    (...args: unknown[]) => unknown
  >;
  const fn = loaded[exported];
  if (!fn) throw new Error(`${name} is not exported`);
  as(PERSONAS[persona](world));
  try {
    if (file.endsWith("actions.ts")) {
      if (!("input" in door)) throw new Error(`${name} needs an input`);
      const result = (await fn(door.input(world))) as {
        ok: boolean;
        error?: { code: string; message: string };
      };
      if (result.ok) return { refused: false, what: "done" };
      const code = result.error?.code ?? "";
      return {
        refused: ["signed-out", "not-found", "not-allowed"].includes(code),
        what: `${code}: ${result.error?.message ?? ""}`,
      };
    }
    if (!("request" in door)) throw new Error(`${name} needs a request`);
    const { request, params } = door.request(world);
    const response = (await fn(request(), { params: Promise.resolve(params) })) as Response;
    return {
      refused: [401, 403, 404].includes(response.status),
      what: `${String(response.status)} ${response.status >= 400 ? await response.text() : ""}`,
    };
  } catch (error) {
    // redirect() is how some actions end well.
    const digest = error instanceof Error && "digest" in error ? String(error.digest) : "";
    if (digest.startsWith("NEXT_REDIRECT")) return { refused: false, what: "redirected" };
    throw error;
  }
}

beforeAll(() => buildWorkers());

test("every action and route of the product is in the table, and nothing else is", () => {
  expect(Object.keys(DOORS).sort()).toEqual(doorsInTheTree().sort());
});

describe.each(Object.entries(DOORS))("%s", (name, door) => {
  const personas = Object.keys(PERSONAS) as Persona[];
  const passing = door.may === "anyone" ? personas : door.may;
  const refused = personas.filter((persona) => !passing.includes(persona));

  test(`refuses ${refused.length === 0 ? "nobody" : "everyone it should"}`, async () => {
    const world = await makeRichWorld();
    for (const persona of refused) {
      const result = await callDoor(door, name, world, persona);
      expect(result, `${name} as ${persona}`).toMatchObject({ refused: true });
    }
  });

  test("lets through whom it should", async () => {
    for (const persona of passing) {
      const world = await makeRichWorld();
      const result = await callDoor(door, name, world, persona);
      expect(result, `${name} as ${persona}: ${result.what}`).toMatchObject({ refused: false });
      expect(result.what, `${name} as ${persona}`).not.toMatch(/^(fault|500)/);
    }
  });
});
