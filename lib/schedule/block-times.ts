import type { Interval } from "./types";

/**
 * Gives each block of a call its time: back to back from `start`, in the order given. Each block comes
 * back with `from` and `to` added. `minutes` is the block's length; zero or less throws a RangeError,
 * since a block without time cannot be called.
 */
export function blockTimes<Block extends { minutes: number }>(
  start: Date,
  blocks: readonly Block[],
): (Block & Interval)[] {
  let at = start.getTime();
  return blocks.map((block) => {
    if (!(block.minutes > 0)) throw new RangeError("A block needs a length above zero minutes.");
    const from = new Date(at);
    at += block.minutes * 60_000;
    return { ...block, from, to: new Date(at) };
  });
}
