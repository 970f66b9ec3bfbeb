// Runs the tests: all of them, or the parts named. Further arguments narrow a part to files, as in
//   npm test -- unit tests/unit/music
// The last line says how many passed and failed.
import { Failure, runMain, Stopped } from "./lib/failure.mjs";
import { listenForStop } from "./lib/lifetime.mjs";
import { takeLock } from "./lib/lock.mjs";
import { print, say } from "./lib/log.mjs";
import { checkNode, ensureNodeModules } from "./lib/packages.mjs";
import { ensureRunDir } from "./lib/paths.mjs";
import { closeTestBed, TEST_LOCK } from "./lib/test-bed.mjs";
import { ensurePrograms, PARTS } from "./lib/test-parts.mjs";

function chosen(args) {
  const names = new Set(args.filter((arg) => PARTS.some(({ name }) => name === arg)));
  const filters = args.filter((arg) => !names.has(arg));
  if (filters.length > 0 && names.size !== 1) {
    throw new Failure(
      `Not a part of the tests: ${filters.join(" ")}`,
      `The parts are ${PARTS.map(({ name }) => name).join(", ")}. After the name of one part, files narrow it.`,
    );
  }
  return { parts: PARTS.filter(({ name }) => names.size === 0 || names.has(name)), filters };
}

/** A part that cannot run is a failure of that part; the others still run. */
async function runPart(part, filters, stop) {
  print();
  say(part.title);
  try {
    return await part.run(filters);
  } catch (error) {
    if (stop.asked || error instanceof Stopped) throw new Stopped();
    print(
      error instanceof Failure ? `${error.message}\n${error.hint}` : String(error?.stack ?? error),
    );
    return { passed: 0, failed: 1 };
  }
}

await runMain(async () => {
  checkNode();
  ensureRunDir();
  const { parts, filters } = chosen(process.argv.slice(2));
  const stop = listenForStop("Stopping the tests");
  const release = takeLock(TEST_LOCK);
  if (!release)
    throw new Failure("Tests or benchmarks are running here already.", "Wait for them to end.");
  const counts = new Map();
  try {
    await closeTestBed();
    await ensurePrograms(parts);
    await ensureNodeModules();
    for (const part of parts) counts.set(part.name, await runPart(part, filters, stop));
  } finally {
    await closeTestBed();
    release();
  }
  print();
  for (const [name, { passed, failed }] of counts) {
    print(
      `${name.padEnd(8)} ${String(passed).padStart(5)} passed ${String(failed).padStart(5)} failed`,
    );
  }
  const sum = (key) => [...counts.values()].reduce((total, count) => total + count[key], 0);
  print(`${sum("passed")} passed, ${sum("failed")} failed`);
  return sum("failed") === 0 ? 0 : 1;
});
