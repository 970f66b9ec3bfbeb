// Ends everything that `npm start` or `npm run dev` runs in this folder, and waits until it has ended.
import { Failure, runMain } from "./lib/failure.mjs";
import { SERVERS, START_LOCK, stopAll } from "./lib/installation.mjs";
import { lockHolder } from "./lib/lock.mjs";
import { print } from "./lib/log.mjs";
import { readJson } from "./lib/paths.mjs";
import { isOurs, waitUntil } from "./lib/process.mjs";

await runMain(async () => {
  const running = SERVERS.filter(({ role, stateFile }) => isOurs(readJson(stateFile)?.pid, role));
  const starter = lockHolder(START_LOCK);
  if (starter) {
    // It ends what it started, in order.
    process.kill(starter.pid, "SIGTERM");
    await waitUntil(() => lockHolder(START_LOCK) === null, 60_000);
  }
  await stopAll();
  if (SERVERS.some(({ role, stateFile }) => isOurs(readJson(stateFile)?.pid, role))) {
    throw new Failure(
      "Not everything could be ended.",
      "Run npm stop with the account that ran npm start.",
    );
  }
  if (!starter && running.length === 0) print("Nothing was running.");
  else
    print(
      running.length > 0
        ? `Stopped: ${running.map(({ name }) => name).join(", ")}.`
        : "Stopped the start.",
    );
});
