// Runs the benchmarks on a test database with the demo season and the built application: one JSON line each on
// standard output, progress on the error stream. Arguments narrow it to benchmarks whose file name holds one of them.
import fs from "node:fs";
import path from "node:path";
import { ensureDebianPackages, findProgram } from "./lib/debian.mjs";
import { Failure, runMain } from "./lib/failure.mjs";
import { listenForStop } from "./lib/lifetime.mjs";
import { takeLock } from "./lib/lock.mjs";
import { logToStderr, say } from "./lib/log.mjs";
import { checkNode, ensureNodeModules } from "./lib/packages.mjs";
import { ensureRunDir, inRun, readJson, root } from "./lib/paths.mjs";
import { run } from "./lib/process.mjs";
import {
  closeTestBed,
  freshApplication,
  PEOPLE_FILE,
  stopApplication,
  TEST_LOCK,
} from "./lib/test-bed.mjs";

const folder = path.join(root, "tests/bench");

function benchmarks(words) {
  const names = fs.existsSync(folder)
    ? fs.readdirSync(folder).filter((name) => /\.bench\.(mjs|ts)$/.test(name))
    : [];
  const wanted = names
    .filter((name) => words.length === 0 || words.some((word) => name.includes(word)))
    .sort();
  if (wanted.length === 0)
    throw new Failure("There is no such benchmark.", `They are in ${folder}.`);
  return wanted;
}

/** Each benchmark gets a fresh database and server, so that none measures what another left. */
async function measure(name) {
  const bench = name.replace(/\.bench\.(mjs|ts)$/, "");
  say(`Benchmark: ${bench}`);
  try {
    const { env, baseUrl, pid } = await freshApplication("bench");
    const resultFile = inRun("test-results", `bench-${bench}.json`);
    fs.rmSync(resultFile, { force: true });
    const context = JSON.stringify({
      baseUrl,
      databaseUrl: env.DATABASE_URL,
      runDir: inRun("test"),
      root,
      appPid: pid,
      mailDir: env.E2E_MAIL_DIR,
      peopleFile: PEOPLE_FILE,
      demoPassword: env.E2E_DEMO_PASSWORD,
      chromium: findProgram("chromium"),
    });
    const args = ["--conditions=react-server", "--import", "tsx", "scripts/lib/bench-child.mjs"];
    await run(process.execPath, [...args, path.join(folder, name), context, resultFile], {
      env: { ...env, NODE_ENV: "production" },
      show: "stderr",
    });
    const { results, error } = readJson(resultFile) ?? { error: "it ended without a result" };
    return error ? [{ bench, error }] : results.map((result) => ({ bench, ...result }));
  } catch (error) {
    if (error instanceof Failure) return [{ bench, error: error.message }];
    throw error;
  } finally {
    await stopApplication();
  }
}

await runMain(async () => {
  logToStderr();
  checkNode();
  ensureRunDir();
  const names = benchmarks(process.argv.slice(2));
  listenForStop("Stopping the benchmarks");
  const release = takeLock(TEST_LOCK);
  if (!release)
    throw new Failure("Tests or benchmarks are running here already.", "Wait for them to end.");
  let failed = false;
  try {
    await closeTestBed();
    await ensureDebianPackages(["mariadb", "chromium"]);
    await ensureNodeModules();
    for (const name of names) {
      for (const line of await measure(name)) {
        failed ||= "error" in line;
        process.stdout.write(`${JSON.stringify(line)}\n`);
      }
    }
  } finally {
    await closeTestBed();
    release();
  }
  return failed ? 1 : 0;
});
