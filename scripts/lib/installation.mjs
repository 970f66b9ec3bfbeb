import { startMailbox } from "./mailbox.mjs";
import { stopByState } from "./app.mjs";
import { createDatabase, startDatabase, stopDatabase } from "./mariadb.mjs";
import { inRun } from "./paths.mjs";
import { appEnvironment, databaseAddress } from "./settings.mjs";

/** The servers of the installation that people use (tests have their own). */
export const DATABASE = { dir: inRun("db"), role: "db" };
export const APP = { role: "app", stateFile: inRun("app.json"), logFile: inRun("app.log") };
const MAILBOX = {
  role: "mailbox",
  mailDir: inRun("mail"),
  stateFile: inRun("mailbox.json"),
  logFile: inRun("mailbox.log"),
};
export const START_LOCK = inRun("start.lock");
export const PEOPLE_FILE = inRun("demo-people.json");

/** The state files by which servers are found again, with the roles they were started in. */
export const SERVERS = [
  { name: "the application", ...APP },
  { name: "the mailbox", ...MAILBOX },
  { name: "MariaDB", role: DATABASE.role, stateFile: inRun("db", "state.json") },
];

/**
 * Starts the database server if it is ours to run, and makes the database and its account.
 * @param {Record<string, string>} settings
 * @returns {Promise<{ databaseUrl: string, started: boolean, own: boolean }>}
 */
export async function openDatabase(settings) {
  const address = databaseAddress(settings.DATABASE_URL);
  if (!address.own) return { databaseUrl: settings.DATABASE_URL, started: false, own: false };
  const { port, started } = await startDatabase(DATABASE);
  await createDatabase(DATABASE.dir, address);
  return { databaseUrl: address.at(port), started, own: true };
}

/**
 * Starts the local mailbox when the settings ask for it.
 * @param {Record<string, string>} settings
 * @returns {Promise<number | null>} its port
 */
export async function openMailbox(settings) {
  if (settings.MAILBOX !== "local") return null;
  return (await startMailbox(MAILBOX)).port;
}

/**
 * Runs something with the database, which is started for it and stopped afterwards unless it ran already.
 * @template T
 * @param {Record<string, string>} settings
 * @param {(env: Record<string, string>) => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function withDatabase(settings, work) {
  const { databaseUrl, started } = await openDatabase(settings);
  try {
    return await work(appEnvironment(settings, { databaseUrl }));
  } finally {
    if (started) await stopDatabase(DATABASE);
  }
}

/**
 * Ends every server of this installation: the application first, the database last.
 * @returns {Promise<string[]>} the names of those that ran
 */
export async function stopAll() {
  const ended = [];
  for (const { name, role, stateFile } of SERVERS.slice(0, 2)) {
    if (await stopByState(stateFile, role)) ended.push(name);
  }
  if (await stopDatabase(DATABASE)) ended.push("MariaDB");
  return ended;
}
