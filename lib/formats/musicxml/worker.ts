import { parentPort } from "node:worker_threads";
import { readScore } from "./read-score";
import { ScoreError, type ScoreErrorCode } from "./score-error";
import type { ParsedScore } from "./types";

export type WorkerRequest = { bytes: Uint8Array; fileName: string };

/** An answer for every request; anything thrown besides a ScoreError ends the thread as a fault. */
export type WorkerAnswer =
  { ok: true; score: ParsedScore } | { ok: false; code: ScoreErrorCode; message: string };

function answer({ bytes, fileName }: WorkerRequest): WorkerAnswer {
  try {
    return { ok: true, score: readScore(bytes, fileName) };
  } catch (error) {
    if (error instanceof ScoreError) return { ok: false, code: error.code, message: error.message };
    throw error;
  }
}

parentPort?.once("message", (request: WorkerRequest) => {
  parentPort?.postMessage(answer(request));
});
