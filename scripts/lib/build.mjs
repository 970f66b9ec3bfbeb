import { createHash } from "node:crypto";
import fs from "node:fs";
import path from "node:path";
import { Failure } from "./failure.mjs";
import { step } from "./log.mjs";
import { inRun, readJson, root, writeJson } from "./paths.mjs";
import { run } from "./process.mjs";

/** What the built application is made of. */
const SOURCES = [
  "app",
  "components",
  "db",
  "lib",
  "fonts",
  "public",
  "next.config.ts",
  "postcss.config.mjs",
  "tsconfig.json",
  "package.json",
  "package-lock.json",
  "proxy.ts",
  "instrumentation.ts",
  "instrumentation-client.ts",
  "scripts/build-workers.mjs",
];
/** No part of the application. */
const LEFT_OUT = ["db/migrations", "db/seed"];

/**
 * A fingerprint of files and folders: it changes when a name or a content does.
 * @param {string[]} names relative to the repository's root
 * @returns {string} hexadecimal
 */
export function fingerprint(names) {
  const hash = createHash("sha256");
  const add = (name) => {
    if (LEFT_OUT.includes(name) && !names.includes(name)) return;
    const file = path.join(root, name);
    const found = fs.statSync(file, { throwIfNoEntry: false });
    if (!found) return;
    if (found.isDirectory()) {
      for (const entry of fs.readdirSync(file).sort()) add(`${name}/${entry}`);
      return;
    }
    const content = fs.readFileSync(file);
    hash.update(`${name}\0${content.length}\0`).update(content);
  };
  for (const name of names) add(name);
  return hash.digest("hex");
}

const record = inRun("build.json");

/**
 * Says whether the built application is that of the present sources.
 * @returns {boolean}
 */
export function isBuilt() {
  const id = readJson(record);
  return (
    id?.sources === fingerprint(SOURCES) &&
    fs.existsSync(path.join(root, ".next/BUILD_ID")) &&
    fs.readFileSync(path.join(root, ".next/BUILD_ID"), "utf8") === id.build &&
    workersPresent()
  );
}

const workersPresent = () => {
  const folder = inRun("workers");
  return fs.existsSync(folder) && fs.readdirSync(folder).length > 0;
};

/** Bundles the threads that run beside the server and are loaded by name. */
export async function buildWorkers() {
  const { code, output } = await run(process.execPath, ["scripts/build-workers.mjs"]);
  if (code !== 0) throw new Failure(`The workers could not be bundled:\n${output.trim()}`);
}

/**
 * Builds the application if its sources have changed since the last build.
 * @param {Record<string, string>} env the settings that the application reads while it is built
 * @param {{ refuse?: Error | null }} [options] refuse: raised instead of building, when a build is needed
 */
export async function ensureBuild(env, { refuse = null } = {}) {
  if (isBuilt()) return;
  if (refuse) throw refuse;
  const sources = fingerprint(SOURCES);
  fs.rmSync(record, { force: true });
  await step("Building the application, up to a minute", async () => {
    await buildWorkers();
    const { code, output } = await run(
      process.execPath,
      ["node_modules/next/dist/bin/next", "build"],
      {
        env: { ...env, NODE_ENV: "production", NEXT_TELEMETRY_DISABLED: "1" },
      },
    );
    if (code !== 0) {
      throw new Failure(
        `The build failed:\n${output.trimEnd().split("\n").slice(-40).join("\n")}`,
        "Mend what it names, then start again.",
      );
    }
  });
  writeJson(record, { sources, build: fs.readFileSync(path.join(root, ".next/BUILD_ID"), "utf8") });
}
