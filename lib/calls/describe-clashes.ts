import type { Interval } from "@/lib/schedule/types";
import { clashInWords } from "./clash-in-words";
import { findCallClashes } from "./find-call-clashes";
import { findRemedies } from "./find-remedies";
import { nearestFreeStart } from "./nearest-free-start";
import type { CallFacts, CallPlan, ClashInWords } from "./types";

/** A room or a pianist that is taken stops the whole call, so it is said before what stops one person. */
const FIRST: Partial<Record<ClashInWords["kind"], number>> = { room: -2, pianist: -1 };

/**
 * Every clash of a call in words, with what to do; the whole call may be moved inside `within`. First the
 * room and the pianist, then people in order of time.
 */
export function describeClashes(
  plan: CallPlan,
  facts: CallFacts,
  within: Interval,
): ClashInWords[] {
  const clashes = findCallClashes(plan, facts).sort(
    (a, b) => (FIRST[a.kind] ?? 0) - (FIRST[b.kind] ?? 0),
  );
  if (clashes.length === 0) return [];
  const freeStart = nearestFreeStart(plan, facts, within);
  return clashes.map((clash) =>
    clashInWords(plan, facts, clash, findRemedies(plan, facts, clash, freeStart)),
  );
}
