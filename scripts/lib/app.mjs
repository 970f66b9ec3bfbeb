import fs from "node:fs";
import { Failure } from "./failure.mjs";
import { readJson, root, writeJson } from "./paths.mjs";
import { endProcess, isOurs, startServer, tail, waitUntil } from "./process.mjs";

/**
 * Asks a server whether it is well.
 * @param {number} port
 * @returns {Promise<boolean>}
 */
export async function isHealthy(port) {
  try {
    const response = await fetch(`http://127.0.0.1:${port}/api/health`, {
      signal: AbortSignal.timeout(5_000),
      redirect: "manual",
    });
    await response.arrayBuffer();
    return response.status === 200;
  } catch {
    return false;
  }
}

/**
 * The application that runs, if one does.
 * @param {string} stateFile
 * @param {string} role
 * @returns {Promise<{ pid: number, port: number, mode: "start" | "dev" } | null>}
 */
export async function runningApp(stateFile, role) {
  const state = readJson(stateFile);
  if (!state || !isOurs(state.pid, role)) return null;
  return (await isHealthy(state.port)) ? state : null;
}

/**
 * Starts the application on loopback and waits until it is well.
 * @param {{ role: string, port: number, env: Record<string, string>, stateFile: string, logFile: string, mode?: "start" | "dev" }} options
 *   in the mode "dev" its output goes to this terminal
 * @returns {Promise<{ pid: number, port: number }>}
 */
export async function startApp({ role, port, env, stateFile, logFile, mode = "start" }) {
  const child = startServer({
    role,
    command: process.execPath,
    args: [`${root}/node_modules/next/dist/bin/next`, mode, "-H", "127.0.0.1", "-p", String(port)],
    env: { ...env, NODE_ENV: mode === "dev" ? "development" : "production" },
    ...(mode === "dev" ? {} : { logFile }),
  });
  writeJson(stateFile, { pid: child.pid, port, mode });
  const ended = () => child.exitCode !== null || child.signalCode !== null;
  await waitUntil(
    async () => ended() || (await isHealthy(port)),
    mode === "dev" ? 120_000 : 30_000,
  );
  if (ended() || !(await isHealthy(port))) {
    await endProcess(child.pid, role);
    fs.rmSync(stateFile, { force: true });
    const end = mode === "dev" ? "" : ` The end of its log (${logFile}):\n${tail(logFile)}`;
    throw new Failure(
      `The application did not become ready.${end}`,
      "Mend what it names, then start again.",
    );
  }
  return { pid: child.pid, port };
}

/**
 * Ends a server that a state file names.
 * @param {string} stateFile
 * @param {string} role
 * @returns {Promise<boolean>} whether there was one
 */
export async function stopByState(stateFile, role) {
  const ended = await endProcess(readJson(stateFile)?.pid, role);
  fs.rmSync(stateFile, { force: true });
  return ended;
}
