import { setTimeout as sleep } from "node:timers/promises";
import { print } from "./log.mjs";
import { interruptCommands } from "./process.mjs";

/**
 * Listens for requests to stop: Ctrl-C, `npm stop`, a closed terminal.
 * @param {string} words what to print at the first request
 * @returns {{ readonly asked: boolean, until: (ended: () => string | null) => Promise<string | null> }}
 *   until: waits for a request (null) or for a reason given by `ended`, asked once a second
 */
export function listenForStop(words) {
  let asked = false;
  let wake = () => undefined;
  const request = new Promise((resolve) => (wake = resolve));
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"]) {
    // Ctrl-C often arrives twice, from the terminal and from npm: the second changes nothing.
    process.on(signal, () => {
      if (asked) return;
      asked = true;
      print(`\n${words}`);
      interruptCommands();
      wake(null);
    });
  }
  return {
    get asked() {
      return asked;
    },
    async until(ended) {
      while (!asked) {
        const reason = ended();
        if (reason) return reason;
        await Promise.race([request, sleep(1_000)]);
      }
      return null;
    },
  };
}
