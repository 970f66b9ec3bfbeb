import "server-only";
import { faultOf } from "@/lib/services/fault";
import { log } from "@/lib/services/log";
import { deliverOutbox } from "./deliver-outbox";
import { sweepRateCounters } from "./rate-limit";

const kept = globalThis as unknown as { cembaloWorker?: NodeJS.Timeout };
const EVERY_MS = 1000;
const SWEEP_EVERY = 3600;

/** Starts the worker of this process: mail that is due once a second, counters swept once an hour. */
export function startWorker(): void {
  if (kept.cembaloWorker) return;
  let busy = false;
  let rounds = 0;
  kept.cembaloWorker = setInterval(() => {
    if (busy) return;
    busy = true;
    rounds += 1;
    const work =
      rounds % SWEEP_EVERY === 0
        ? sweepRateCounters().then(() => deliverOutbox())
        : deliverOutbox();
    work
      .catch((error: unknown) => {
        log.error({ err: faultOf(error) }, "worker round failed");
      })
      .finally(() => {
        busy = false;
      });
  }, EVERY_MS);
  kept.cembaloWorker.unref();
}
