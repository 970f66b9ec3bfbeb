import { beforeAll, describe, expect, test } from "vitest";
import { readScore } from "@/lib/formats/musicxml/read-score";
import { readScoreInWorker } from "@/lib/formats/musicxml/read-score-in-worker";
import { buildWorkers } from "@/scripts/build-workers.mjs";
import { fixture } from "./fixtures";

beforeAll(async () => {
  await buildWorkers();
}, 60_000);

describe("reading in a thread", () => {
  const work = () => fixture("works/stanford-sailing-at-dawn.mxl");

  test("gives what reading here gives", async () => {
    expect(await readScoreInWorker(work(), "a.mxl")).toEqual(readScore(work(), "a.mxl"));
  });

  test("leaves the caller's bytes usable", async () => {
    const bytes = new Uint8Array(work());
    await readScoreInWorker(bytes, "a.mxl");
    expect(bytes).toHaveLength(work().length);
  });

  test("passes a refusal on with its code and words", async () => {
    await expect(
      readScoreInWorker(fixture("hostile/html-root.musicxml"), "a.musicxml"),
    ).rejects.toMatchObject({
      code: "score.not-musicxml",
      kind: "wrong-kind",
      message: expect.stringContaining("<html>") as string,
    });
  });

  test("ends a reading that takes too long, and the next one works", async () => {
    await expect(
      readScoreInWorker(fixture("hostile/huge-measure-count.mxl"), "a.mxl", { timeoutMs: 1 }),
    ).rejects.toMatchObject({ code: "score.took-too-long" });
    expect((await readScoreInWorker(work(), "a.mxl")).measures.written).toBe(70);
  });

  test("takes many at once, in turn, while the caller goes on", async () => {
    let ticks = 0;
    const timer = setInterval(() => {
      ticks += 1;
    }, 5);
    const scores = await Promise.all(
      Array.from({ length: 5 }, () => readScoreInWorker(work(), "a.mxl")),
    );
    clearInterval(timer);
    expect(scores.map(({ measures }) => measures.performed)).toEqual([79, 79, 79, 79, 79]);
    expect(ticks).toBeGreaterThan(5);
  });
});
