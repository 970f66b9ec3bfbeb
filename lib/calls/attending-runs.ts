import type { Interval } from "@/lib/schedule/types";
import type { PlannedBlock } from "./types";

/** Who a block really calls: those let off by hand are not called. */
export function calledTo(block: Pick<PlannedBlock, "called">): string[] {
  return block.called.filter((person) => !person.excused).map((person) => person.personId);
}

/**
 * When each person is needed in a call: one stretch for each run of blocks on end. Waiting between two
 * blocks is no part of it, and neither is a break.
 */
export function attendingRuns(blocks: readonly PlannedBlock[]): Map<string, Interval[]> {
  const runs = new Map<string, Interval[]>();
  for (const block of blocks) {
    for (const personId of new Set(calledTo(block))) {
      const theirs = runs.get(personId) ?? [];
      const last = theirs.at(-1);
      if (last && last.to.getTime() === block.from.getTime()) last.to = block.to;
      else theirs.push({ from: block.from, to: block.to });
      runs.set(personId, theirs);
    }
  }
  return runs;
}
