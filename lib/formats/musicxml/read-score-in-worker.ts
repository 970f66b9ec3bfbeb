import path from "node:path";
import { Worker } from "node:worker_threads";
import { ScoreError } from "./score-error";
import type { ParsedScore } from "./types";
import type { WorkerAnswer, WorkerRequest } from "./worker";

const TIMEOUT_MS = 10_000;
const MEMORY_MB = 192;
/** Scores read at once; the others wait their turn, so that uploads cannot take the whole machine. */
const AT_ONCE = 2;

let running = 0;
const waiting: (() => void)[] = [];

async function takeTurn(): Promise<void> {
  if (running >= AT_ONCE) {
    await new Promise<void>((resolve) => {
      waiting.push(resolve);
    });
  }
  running += 1;
}

function endTurn(): void {
  running -= 1;
  waiting.shift()?.();
}

function ask(worker: Worker, request: WorkerRequest, timeoutMs: number): Promise<ParsedScore> {
  return new Promise((resolve, reject) => {
    const timer = setTimeout(() => {
      reject(
        new ScoreError(
          "score.took-too-long",
          "Reading this score took too long. Export it number by number and choose the parts you need.",
        ),
      );
    }, timeoutMs);
    worker.once("message", (answer: WorkerAnswer) => {
      clearTimeout(timer);
      if (answer.ok) resolve(answer.score);
      else reject(new ScoreError(answer.code, answer.message));
    });
    worker.once("error", (error: NodeJS.ErrnoException) => {
      clearTimeout(timer);
      reject(
        error.code === "ERR_WORKER_OUT_OF_MEMORY"
          ? new ScoreError(
              "score.too-large",
              "The score is too large to be read here. Export it number by number.",
            )
          : error,
      );
    });
    worker.once("exit", () => {
      clearTimeout(timer);
      reject(new Error("The score reader stopped without an answer."));
    });
    worker.postMessage(request);
  });
}

/**
 * `readScore` in a thread of its own, so that the server goes on answering, with limits on time and
 * memory. In: the file's bytes, its name, and how long it may take (10 s). Out: as `readScore`.
 * Throws a ScoreError for a score that cannot be read, and any other error for a fault, such as a
 * reader that was not built (`scripts/build-workers.mjs`).
 */
export async function readScoreInWorker(
  bytes: Uint8Array,
  fileName: string,
  options: { timeoutMs?: number } = {},
): Promise<ParsedScore> {
  await takeTurn();
  let worker: Worker | undefined;
  try {
    // Built apart from the pages and found at run time, so it must not be bundled with them.
    const file = path.join(/* turbopackIgnore: true */ process.cwd(), ".run/workers/musicxml.mjs");
    worker = new Worker(/* turbopackIgnore: true */ file, {
      // A thread that reads strangers' files needs none of the server's secrets or switches.
      env: {},
      execArgv: [],
      resourceLimits: { maxOldGenerationSizeMb: MEMORY_MB },
    });
    return await ask(worker, { bytes, fileName }, options.timeoutMs ?? TIMEOUT_MS);
  } finally {
    await worker?.terminate();
    endTurn();
  }
}
