// Works on the database of this installation: migrate, seed, or generate a migration from the schema.
import { spawnSync } from "node:child_process";
import { Failure, runMain } from "./lib/failure.mjs";
import { PEOPLE_FILE, withDatabase } from "./lib/installation.mjs";
import { print, say, step } from "./lib/log.mjs";
import { migrate, seed } from "./lib/schema.mjs";
import { demoPassword, ensureSettings } from "./lib/settings.mjs";
import { ensureRunDir, root } from "./lib/paths.mjs";

const TASKS = {
  migrate: (env) => step("Bringing the database up to date", () => migrate(env)),
  seed: (env) =>
    step("Loading the demo season", () =>
      seed(env, { password: demoPassword(), peopleFile: PEOPLE_FILE }),
    ),
};

await runMain(async () => {
  const [name, ...rest] = process.argv.slice(2);
  if (name === "generate") {
    // It asks whether a column was renamed, and without a terminal it would end as if nothing were to be done.
    if (!process.stdin.isTTY)
      say("No terminal here: a renamed table or column cannot be asked about");
    const result = spawnSync(
      process.execPath,
      ["node_modules/drizzle-kit/bin.cjs", "generate", ...rest],
      {
        cwd: root,
        stdio: "inherit",
      },
    );
    return result.status ?? 1;
  }
  const task = TASKS[name];
  if (!task)
    throw new Failure(
      "Say what to do: migrate, seed or generate.",
      "For example: npm run db:migrate",
    );
  ensureRunDir();
  await withDatabase(ensureSettings(), task);
  print("Done.");
});
