import { spawnSync } from "node:child_process";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { program } from "./debian.mjs";
import { Failure } from "./failure.mjs";
import { say } from "./log.mjs";
import { databaseFiles, writeConfig } from "./mariadb-files.mjs";
import { readJson, readText, writeJson } from "./paths.mjs";
import { anyFreePort } from "./ports.mjs";
import { endProcess, isOurs, run, startServer, tail, waitUntil } from "./process.mjs";

/**
 * A database server of this installation.
 * @typedef {{ dir: string, role: string, relaxed?: boolean }} Server
 *   dir: its folder; role: the name its process is known by; relaxed: give durability up for speed (tests)
 */

const isRoot = () => process.getuid?.() === 0;

/** The account the server runs as: root hands over to `mysql` when that account can reach the folder. */
function serverAccount(files) {
  if (!isRoot()) return os.userInfo().username;
  const owner = fs.statSync(files.data, { throwIfNoEntry: false })?.uid;
  const ids = spawnSync("id", ["-u", "mysql"], { encoding: "utf8" });
  const mysql = ids.status === 0 ? Number(ids.stdout) : null;
  const group =
    mysql === null ? null : Number(spawnSync("id", ["-g", "mysql"], { encoding: "utf8" }).stdout);
  if (owner !== undefined && owner !== mysql) {
    const name = spawnSync("id", ["-un", String(owner)], { encoding: "utf8" }).stdout.trim();
    return name || "root";
  }
  if (mysql === null) return "root";
  const reach = spawnSync("test", ["-x", path.dirname(files.dir)], { uid: mysql, gid: group });
  return reach.status === 0 ? "mysql" : "root";
}

function giveTo(account, ...folders) {
  if (!isRoot()) return;
  for (const folder of folders) spawnSync("chown", ["-R", `${account}:`, folder]);
}

/** Makes the system tables once. A folder left half made by an interrupted start is made again. */
async function initialise(files, account) {
  if (fs.existsSync(files.ready)) return;
  say("Making a new database folder");
  fs.rmSync(files.data, { recursive: true, force: true });
  fs.mkdirSync(files.data, { recursive: true, mode: 0o700 });
  giveTo(account, files.dir, files.data);
  const options = [
    "--no-defaults",
    ...(isRoot() ? [`--user=${account}`] : []),
    // Named from inside its folder: the script does not survive a space in a longer path.
    `--datadir=./${path.basename(files.data)}`,
    "--auth-root-authentication-method=socket",
    `--auth-root-socket-user=${isRoot() ? "root" : account}`,
    "--skip-test-db",
    "--skip-name-resolve",
    "--innodb-log-file-size=32M",
  ];
  const { code, output } = await run(program("mariadb-install-db"), options, { cwd: files.dir });
  if (code !== 0) {
    throw new Failure(
      `The database folder could not be made:\n${output.trimEnd().split("\n").slice(-15).join("\n")}`,
      `Check that there is room on the disk for ${files.dir}, then start again.`,
    );
  }
  fs.writeFileSync(files.ready, "");
}

/** The pid of a server that runs on this folder, whoever noted it. */
function runningPid(files, role) {
  const pids = [readJson(files.state)?.pid, Number(readText(files.pid))];
  return pids.find((pid) => isOurs(pid, role)) ?? null;
}

const answers = async (files) => {
  if (!fs.existsSync(files.socket)) return false;
  const ping = await run(program("mariadb-admin"), [
    `--defaults-file=${files.config}`,
    "--connect-timeout=2",
    "ping",
  ]);
  return ping.code === 0;
};

/**
 * Starts a server, or finds the one that runs already, and waits until it answers.
 * @param {Server} server
 * @returns {Promise<{ port: number, started: boolean }>} its port on 127.0.0.1
 */
export async function startDatabase({ dir, role, relaxed = false }) {
  const files = databaseFiles(dir);
  const running = runningPid(files, role);
  if (running && (await waitUntil(() => answers(files), 20_000))) {
    const port = Number(readText(files.port));
    writeJson(files.state, { pid: running, port });
    return { port, started: false };
  }
  if (running) await endProcess(running, role, 30_000);

  const uid = fs.statSync(files.data, { throwIfNoEntry: false })?.uid;
  if (uid !== undefined && !isRoot() && uid !== process.getuid?.()) {
    throw new Failure(
      `The database in ${files.dir} belongs to another account.`,
      "Start with the account that made it (root, if that was root).",
    );
  }
  fs.mkdirSync(files.dir, { recursive: true });
  fs.mkdirSync(files.temporary, { recursive: true, mode: 0o700 });
  fs.mkdirSync(path.dirname(files.socket), { recursive: true, mode: 0o700 });
  const account = serverAccount(files);
  giveTo(account, files.dir);
  if (path.dirname(files.socket) !== files.dir) giveTo(account, path.dirname(files.socket));
  await initialise(files, account);

  for (const file of [files.pid, files.socket]) fs.rmSync(file, { force: true });
  const port = await anyFreePort(Number(readText(files.port)) || undefined);
  fs.writeFileSync(files.port, `${port}\n`);
  writeConfig(files, { port, relaxed });
  giveTo(account, files.config);
  const child = startServer({
    role,
    command: program("mariadbd"),
    args: [`--defaults-file=${files.config}`, ...(isRoot() ? [`--user=${account}`] : [])],
    cwd: "/",
    logFile: files.log,
  });
  writeJson(files.state, { pid: child.pid, port });
  const up = await waitUntil(async () => child.exitCode !== null || (await answers(files)), 60_000);
  if (!up || child.exitCode !== null) {
    await endProcess(child.pid, role);
    throw new Failure(
      `MariaDB did not start. The end of its log (${files.log}):\n${tail(files.log)}`,
      "Mend what it names, then start again. The data is untouched.",
    );
  }
  return { port, started: true };
}

/**
 * Stops a server cleanly.
 * @param {Server} server
 * @returns {Promise<boolean>} whether there was one to stop
 */
export async function stopDatabase({ dir, role }) {
  const files = databaseFiles(dir);
  const pid = runningPid(files, role);
  if (pid) {
    // Not through run(): a stop request ends other commands, and this one has to go through.
    spawnSync(program("mariadb-admin"), [`--defaults-file=${files.config}`, "shutdown"], {
      timeout: 30_000,
    });
    if (!(await waitUntil(() => !isOurs(pid, role), 5_000))) await endProcess(pid, role, 30_000);
  }
  fs.rmSync(files.state, { force: true });
  return pid !== null;
}

/**
 * Runs statements as the server's administrator.
 * @param {string} dir the server's folder
 * @param {string} sql
 * @returns {Promise<string>} rows, with tabs between columns and no heading
 */
export async function execute(dir, sql) {
  const files = databaseFiles(dir);
  const { code, output } = await run(
    program("mariadb"),
    [`--defaults-file=${files.config}`, "--skip-column-names", "--batch"],
    { input: sql },
  );
  if (code !== 0) throw new Failure(`MariaDB refused a statement of the set-up:\n${output.trim()}`);
  return output.trim();
}

/**
 * Makes a database and the account of the application, with the password given.
 * @param {string} dir the server's folder
 * @param {{ name: string, user: string, password: string, fresh?: boolean }} options
 *   fresh: throw away what an earlier run left in it
 */
export async function createDatabase(dir, { name, user, password, fresh = false }) {
  const quoted = (text) => `'${text.replace(/[\\']/g, "\\$&")}'`;
  const identifier = (text) => `\`${text.replaceAll("`", "``")}\``;
  const account = `${quoted(user)}@'127.0.0.1'`;
  await execute(
    dir,
    [
      ...(fresh ? [`DROP DATABASE IF EXISTS ${identifier(name)}`] : []),
      `CREATE DATABASE IF NOT EXISTS ${identifier(name)} CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci`,
      `CREATE USER IF NOT EXISTS ${account} IDENTIFIED BY ${quoted(password)}`,
      `ALTER USER ${account} IDENTIFIED BY ${quoted(password)}`,
      `GRANT ALL PRIVILEGES ON ${identifier(name)}.* TO ${account}`,
    ]
      .map((statement) => `${statement};\n`)
      .join(""),
  );
}
