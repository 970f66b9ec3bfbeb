// Sets up what is missing, starts everything, and stays until it is asked to stop.
// `--dev` serves the sources as they are edited instead of a build.
import path from "node:path";
import { runningApp, startApp } from "./lib/app.mjs";
import { buildWorkers, ensureBuild } from "./lib/build.mjs";
import { ensureDebianPackages } from "./lib/debian.mjs";
import { Failure, runMain, Stopped } from "./lib/failure.mjs";
import {
  APP,
  DATABASE,
  openDatabase,
  openMailbox,
  PEOPLE_FILE,
  SERVERS,
  START_LOCK,
  stopAll,
} from "./lib/installation.mjs";
import { listenForStop } from "./lib/lifetime.mjs";
import { lockHolder, takeLock } from "./lib/lock.mjs";
import { print, say, step } from "./lib/log.mjs";
import { checkNode, ensureNodeModules } from "./lib/packages.mjs";
import { ensureRunDir, readJson } from "./lib/paths.mjs";
import { firstFreePort } from "./lib/ports.mjs";
import { isOurs, tail, waitUntil } from "./lib/process.mjs";
import { ensureSchema } from "./lib/schema.mjs";
import { appEnvironment, databaseAddress, demoPassword, ensureSettings } from "./lib/settings.mjs";
import { welcome } from "./lib/welcome.mjs";

const mode = process.argv.includes("--dev") ? "dev" : "start";
const addressOf = (port) => `http://localhost:${port}`;

/** What to do when a server runs already: the same words as for one just started. */
function showRunning(app) {
  if (app.mode !== mode) {
    throw new Failure(
      `Cembalo is running already at ${addressOf(app.port)}, ${app.mode === "dev" ? "for development" : "as a build"}.`,
      "Run npm stop first to change over.",
    );
  }
  welcome(addressOf(app.port));
  print("\nIt was running already. To end it: npm stop");
}

/** Another start holds the lock: wait for its server, then show that. */
async function followOther(stop) {
  say(
    `Another start is under way (process ${lockHolder(START_LOCK)?.pid ?? "unknown"}): waiting for it`,
  );
  let app = null;
  await waitUntil(async () => {
    app = await runningApp(APP.stateFile, APP.role);
    return stop.asked || app !== null || lockHolder(START_LOCK) === null;
  }, 600_000);
  if (stop.asked) throw new Stopped();
  if (!app) throw new Failure("The other start ended without a server.", "Run npm start again.");
  showRunning(app);
}

async function setUp() {
  const settings = ensureSettings();
  const address = databaseAddress(settings.DATABASE_URL);
  if (address.own) await ensureDebianPackages(["mariadb"]);
  await ensureNodeModules();

  const { databaseUrl } = await step(
    address.own ? "Starting MariaDB" : "Using the database in .env.local",
    () => openDatabase(settings),
  );
  const base = appEnvironment(settings, { databaseUrl, port: 3000 });
  await ensureSchema(base, {
    password: demoPassword(),
    peopleFile: PEOPLE_FILE,
    recordDir: DATABASE.dir,
  });
  if (mode === "dev") await buildWorkers();
  else await ensureBuild(base);

  const smtpPort = await openMailbox(settings);
  const port = await firstFreePort(3000);
  const env = appEnvironment(settings, { databaseUrl, port, smtpPort });
  await step(`Starting the application on port ${port}`, () =>
    startApp({ ...APP, port, env, mode }),
  );
  return port;
}

/** Says which of the servers has ended, if one has. */
function endedServer() {
  for (const { name, role, stateFile, logFile } of SERVERS) {
    const state = readJson(stateFile);
    if (state && !isOurs(state.pid, role)) {
      const log = logFile && mode !== "dev" ? `\n${tail(logFile)}` : "";
      return `Unexpectedly, ${name} has ended.${log}`;
    }
  }
  return null;
}

await runMain(async () => {
  checkNode();
  ensureRunDir();
  const stop = listenForStop("Stopping");
  const running = await runningApp(APP.stateFile, APP.role);
  if (running) return showRunning(running);
  const release = takeLock(START_LOCK, { mode, folder: path.basename(process.cwd()) });
  if (!release) return followOther(stop);

  try {
    // What an earlier run that was cut short has left behind.
    await stopAll();
    const port = await setUp();
    welcome(addressOf(port));
    print("\nTo end it: Ctrl-C here, or npm stop in another terminal");
    const reason = await stop.until(endedServer);
    if (reason)
      throw new Failure(reason, "Everything else is being stopped. Run npm start to begin again.");
  } finally {
    await stopAll();
    release();
    if (stop.asked) say("Stopped");
  }
});
