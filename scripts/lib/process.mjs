import { spawn } from "node:child_process";
import fs from "node:fs";
import path from "node:path";
import { setTimeout as sleep } from "node:timers/promises";
import { Failure, Stopped } from "./failure.mjs";
import { root, runDir } from "./paths.mjs";

/** The mark by which a process of this installation is known again: a pid alone may have been given to another. */
const MARK = "CEMBALO_PROCESS";
const markOf = (role) => `${MARK}=${role}:${runDir}`;

/** Children of the moment, so that a stop request can end the step that is running. */
const current = new Set();
let stopping = false;

/**
 * Says whether a process is alive and was started by this installation in the given role.
 * @param {number | undefined} pid
 * @param {string} role
 * @returns {boolean}
 */
export function isOurs(pid, role) {
  if (!Number.isInteger(pid) || pid <= 1) return false;
  try {
    // A finished process that nobody has collected yet has an empty environment.
    return fs.readFileSync(`/proc/${pid}/environ`, "utf8").split("\0").includes(markOf(role));
  } catch {
    return false;
  }
}

/**
 * Starts a server in a process group of its own, marked with its role.
 * @param {{ role: string, command: string, args: string[], env?: Record<string, string>, cwd?: string, logFile?: string }} options
 *   without a log file the server writes to this terminal
 * @returns {import("node:child_process").ChildProcess}
 */
export function startServer({ role, command, args, env = {}, cwd = root, logFile }) {
  let output = "inherit";
  if (logFile) {
    fs.mkdirSync(path.dirname(logFile), { recursive: true });
    output = fs.openSync(logFile, "w", 0o600);
  }
  const child = spawn(command, args, {
    cwd,
    detached: true,
    stdio: ["ignore", output, output],
    env: { ...process.env, ...env, [MARK]: `${role}:${runDir}` },
  });
  child.on("error", () => undefined);
  if (typeof output === "number") fs.closeSync(output);
  return child;
}

/**
 * Ends a process of ours and waits until it is gone: politely first, by force after the time given.
 * @param {number | undefined} pid
 * @param {string} role a process that is not ours in this role is left alone
 * @param {number} [patience] milliseconds
 * @returns {Promise<boolean>} whether there was anything to end
 */
export async function endProcess(pid, role, patience = 10_000) {
  if (!isOurs(pid, role)) return false;
  signalGroup(pid, "SIGTERM");
  if (await waitUntil(() => !isOurs(pid, role), patience)) return true;
  signalGroup(pid, "SIGKILL");
  await waitUntil(() => !isOurs(pid, role), 5_000);
  return true;
}

function signalGroup(pid, signal) {
  for (const target of [-pid, pid]) {
    try {
      process.kill(target, signal);
      return;
    } catch {
      // No such group: try the process alone.
    }
  }
}

/**
 * Waits for a condition, asking often.
 * @param {() => boolean | Promise<boolean>} condition
 * @param {number} patience milliseconds
 * @returns {Promise<boolean>} whether it came true in time
 */
export async function waitUntil(condition, patience) {
  const end = performance.now() + patience;
  for (;;) {
    if (await condition()) return true;
    if (performance.now() >= end) return false;
    await sleep(50);
  }
}

/**
 * Runs a command to its end.
 * @param {string} command
 * @param {string[]} args
 * @param {{ env?: Record<string, string | undefined>, cwd?: string, input?: string, show?: boolean | "stderr", letFinish?: boolean }} [options]
 *   show: let it write to this terminal (standard output goes to the error stream when `show` is "stderr");
 *   letFinish: a stop request waits for its end
 * @returns {Promise<{ code: number, output: string }>} exit code and what it wrote, when not shown
 */
export async function run(
  command,
  args,
  { env = {}, cwd = root, input, show = false, letFinish = false } = {},
) {
  if (stopping) throw new Stopped();
  const shown = show === "stderr" ? [process.stderr, "inherit"] : ["inherit", "inherit"];
  const child = spawn(command, args, {
    cwd,
    detached: true,
    env: { ...process.env, ...env },
    stdio: [input === undefined ? "ignore" : "pipe", ...(show ? shown : ["pipe", "pipe"])],
  });
  if (!letFinish) current.add(child);
  let output = "";
  child.stdout?.setEncoding("utf8").on("data", (text) => (output += text));
  child.stderr?.setEncoding("utf8").on("data", (text) => (output += text));
  if (input !== undefined) {
    child.stdin.on("error", () => undefined);
    child.stdin.end(input);
  }
  try {
    const code = await new Promise((resolve, reject) => {
      child.on("error", (error) =>
        reject(new Failure(`${path.basename(command)} could not be run: ${error.message}`)),
      );
      child.on("close", (exit, signal) => resolve(exit ?? (signal ? 1 : 0)));
    });
    if (stopping) throw new Stopped();
    return { code, output };
  } finally {
    current.delete(child);
  }
}

/** Ends the command that is running; those asked for afterwards do not start. */
export function interruptCommands() {
  stopping = true;
  for (const child of current) if (child.pid) signalGroup(child.pid, "SIGTERM");
}

/**
 * The last lines of a log, for a message.
 * @param {string} file
 * @param {number} [count]
 * @returns {string}
 */
export function tail(file, count = 25) {
  try {
    return fs.readFileSync(file, "utf8").trimEnd().split("\n").slice(-count).join("\n");
  } catch {
    return "";
  }
}
