import { stopByState } from "./app.mjs";
import { Failure } from "./failure.mjs";
import { readJson, root } from "./paths.mjs";
import { isOurs, startServer, tail, waitUntil } from "./process.mjs";

/**
 * Starts the local mailbox: a mail server on loopback that keeps what it gets in a folder and sends nothing on.
 * @param {{ role: string, mailDir: string, stateFile: string, logFile: string }} options
 * @returns {Promise<{ port: number }>}
 */
export async function startMailbox({ role, mailDir, stateFile, logFile }) {
  await stopByState(stateFile, role);
  const child = startServer({
    role,
    command: process.execPath,
    args: [`${root}/scripts/mailbox/serve.mjs`, mailDir, stateFile],
    logFile,
  });
  const ready = () => {
    const state = readJson(stateFile);
    return state?.pid === child.pid && isOurs(child.pid, role) && state.port;
  };
  await waitUntil(() => child.exitCode !== null || Boolean(ready()), 15_000);
  if (!ready()) {
    await stopByState(stateFile, role);
    throw new Failure(`The local mailbox did not start:\n${tail(logFile)}`);
  }
  return { port: readJson(stateFile).port };
}
