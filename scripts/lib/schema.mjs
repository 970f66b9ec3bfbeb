import fs from "node:fs";
import path from "node:path";
import { fingerprint } from "./build.mjs";
import { Failure } from "./failure.mjs";
import { step } from "./log.mjs";
import { readText } from "./paths.mjs";
import { run } from "./process.mjs";

/**
 * Runs a TypeScript file of the server's side.
 * @param {string} file relative to the repository's root
 * @param {{ args?: string[], env?: Record<string, string>, show?: boolean | "stderr" }} [options]
 * @returns {Promise<{ code: number, output: string }>}
 */
export const runTypeScript = (file, { args = [], env = {}, show = false } = {}) =>
  run(process.execPath, ["--conditions=react-server", "--import", "tsx", file, ...args], {
    env,
    show,
  });

async function task(file, env, what, hint) {
  const { code, output } = await runTypeScript(file, { env });
  if (code !== 0) {
    throw new Failure(`${what}:\n${output.trimEnd().split("\n").slice(-25).join("\n")}`, hint);
  }
}

/**
 * Brings a database to the schema of the sources.
 * @param {Record<string, string>} env with DATABASE_URL
 */
export const migrate = (env) =>
  task(
    "db/migrate.ts",
    env,
    "The database could not be brought up to date",
    "The data that was there is kept. Mend the migration that it names, then start again.",
  );

/**
 * Loads the demo season, unless it is there.
 * @param {Record<string, string>} env the application's environment
 * @param {{ password: string, peopleFile: string }} options
 *   peopleFile: where the seed writes whom to sign in as
 */
export const seed = (env, { password, peopleFile }) =>
  task(
    "db/seed/index.ts",
    { ...env, DEMO_PASSWORD: password, DEMO_PEOPLE_FILE: peopleFile },
    "The demo season could not be loaded",
    "Start again: it goes on where it stopped.",
  );

/**
 * Migrates and seeds, each only when something has changed since it last went well.
 * @param {Record<string, string>} env the application's environment
 * @param {{ password: string, peopleFile: string, recordDir: string }} options
 *   recordDir: the database server's own folder, so that the record goes when the data goes
 */
export async function ensureSchema(env, { password, peopleFile, recordDir }) {
  const migrated = path.join(recordDir, "migrated");
  const schema =
    fingerprint(["db/migrations", "db/migrate.ts"]) + env.DATABASE_URL.replace(/^.*\//, " ");
  if (readText(migrated) !== schema) {
    await step("Bringing the database up to date", () => migrate(env));
    fs.writeFileSync(migrated, schema);
  }
  const seeded = path.join(recordDir, "seeded");
  if (!fs.existsSync(seeded) || !fs.existsSync(peopleFile)) {
    await step("Loading the demo season", () => seed(env, { password, peopleFile }));
    fs.writeFileSync(seeded, "");
  }
}
