import fs from "node:fs";
import { ensureDebianPackages, program } from "./debian.mjs";
import { print, step } from "./log.mjs";
import { inRun, readJson } from "./paths.mjs";
import { run } from "./process.mjs";
import { freshApplication, freshDatabase, stopApplication } from "./test-bed.mjs";

/** @typedef {{ passed: number, failed: number }} Count */

const npx = (tool, ...args) =>
  run(process.execPath, [`node_modules/${tool}`, ...args], { show: true });

/** A check that holds or does not: counted as one. */
const check = (runCheck) => async () => {
  const { code } = await runCheck();
  return code === 0 ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 };
};

/** The types of the routes: made from the files under app/, and needed by the type-aware checks. */
let typesMade = false;
async function makeRouteTypes() {
  if (typesMade) return;
  await step("Making the route types", () =>
    run(process.execPath, ["node_modules/next/dist/bin/next", "typegen"], {
      env: { NEXT_TELEMETRY_DISABLED: "1" },
    }),
  );
  typesMade = true;
}

/**
 * Runs one vitest project and counts what it really ran.
 * @param {string} part
 * @param {Record<string, string>} env
 * @param {string[]} filters file names to narrow the run to
 * @returns {Promise<Count>}
 */
async function vitest(part, env, filters) {
  const report = inRun("test-results", `${part}.json`);
  fs.mkdirSync(inRun("test-results"), { recursive: true });
  fs.rmSync(report, { force: true });
  const { code } = await run(
    process.execPath,
    [
      "node_modules/vitest/vitest.mjs",
      "run",
      `--project=${part}`,
      "--reporter=default",
      "--reporter=json",
      `--outputFile.json=${report}`,
      ...filters,
    ],
    { env: { ...env, NODE_ENV: "test" }, show: true },
  );
  const result = readJson(report);
  const files = result?.testResults ?? [];
  // A file that could not be loaded has no tests to count, and one that was skipped has checked nothing.
  const unloadable = files.filter(
    ({ status, assertionResults }) => status === "failed" && !assertionResults.length,
  );
  const skipped = (result?.numPendingTests ?? 0) + (result?.numTodoTests ?? 0);
  if (skipped > 0) print(`${skipped} skipped: each counts as failed.`);
  const passed = result?.numPassedTests ?? 0;
  const failed = (result?.numFailedTests ?? 0) + unloadable.length + skipped;
  // An error outside any test, or no tests at all, shows in the exit code alone.
  return { passed, failed: code !== 0 && failed === 0 ? 1 : failed };
}

const withDatabase = (part) => async (filters) => vitest(part, await freshDatabase(part), filters);

/**
 * The parts of the tests, in the order they run.
 * @type {{ name: string, title: string, needs?: ("mariadb" | "chromium")[], run: (filters: string[]) => Promise<Count> }[]}
 */
export const PARTS = [
  {
    name: "lint",
    title: "Lint and format",
    run: check(async () => {
      await makeRouteTypes();
      const lint = await npx("eslint/bin/eslint.js", ".");
      const format = await npx("prettier/bin/prettier.cjs", "--check", "--log-level=warn", ".");
      return { code: lint.code || format.code };
    }),
  },
  {
    name: "types",
    title: "Types",
    run: check(async () => {
      await makeRouteTypes();
      return npx("typescript/bin/tsc", "--noEmit");
    }),
  },
  {
    name: "deps",
    title: "Direction of imports",
    run: check(() =>
      npx(
        "dependency-cruiser/bin/dependency-cruise.mjs",
        "--config",
        ".dependency-cruiser.cjs",
        ".",
      ),
    ),
  },
  {
    name: "knip",
    title: "Nothing unused",
    run: check(() => npx("knip/bin/knip.js", "--no-progress")),
  },
  { name: "unit", title: "Unit tests", run: (filters) => vitest("unit", {}, filters) },
  { name: "db", title: "Database tests", needs: ["mariadb"], run: withDatabase("db") },
  { name: "actions", title: "Action tests", needs: ["mariadb"], run: withDatabase("actions") },
  { name: "routes", title: "Route tests", needs: ["mariadb"], run: withDatabase("routes") },
  {
    name: "e2e",
    title: "Browser tests",
    needs: ["mariadb", "chromium"],
    async run(filters) {
      try {
        const { env } = await freshApplication("e2e");
        return await vitest("e2e", { ...env, E2E_CHROMIUM: program("chromium") }, filters);
      } finally {
        await stopApplication();
      }
    },
  },
];

/**
 * Installs what the parts need.
 * @param {typeof PARTS} parts
 */
export const ensurePrograms = (parts) =>
  ensureDebianPackages([...new Set(parts.flatMap(({ needs = [] }) => needs))]);
