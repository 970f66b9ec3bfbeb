import { calledTo } from "./attending-runs";
import type { PlannedBlock } from "./types";

/**
 * Singer-minutes of waiting in a call: for each person, the minutes of the blocks between their first
 * and their last that do not call them. A break is nobody's waiting. Three people waiting 20 minutes
 * each are 60.
 */
export function waitingMinutes(
  blocks: readonly Pick<PlannedBlock, "kind" | "minutes" | "called">[],
): number {
  const working = blocks.filter((block) => block.kind !== "break");
  const places = new Map<string, { first: number; last: number; needed: number }>();
  for (const [place, block] of working.entries()) {
    for (const personId of new Set(calledTo(block))) {
      const seen = places.get(personId) ?? { first: place, last: place, needed: 0 };
      places.set(personId, { ...seen, last: place, needed: seen.needed + block.minutes });
    }
  }
  let total = 0;
  for (const { first, last, needed } of places.values()) {
    const span = working.slice(first, last + 1).reduce((sum, block) => sum + block.minutes, 0);
    total += span - needed;
  }
  return total;
}
