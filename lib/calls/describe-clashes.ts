import type { Interval } from "@/lib/schedule/types";
import { clashInWords } from "./clash-in-words";
import { findCallClashes } from "./find-call-clashes";
import { findRemedies } from "./find-remedies";
import { nearestFreeStart } from "./nearest-free-start";
import type { CallFacts, CallPlan, ClashInWords } from "./types";

/** Every clash of a call in words, with what to do; the whole call may be moved inside `within`. */
export function describeClashes(
  plan: CallPlan,
  facts: CallFacts,
  within: Interval,
): ClashInWords[] {
  const clashes = findCallClashes(plan, facts);
  if (clashes.length === 0) return [];
  const freeStart = nearestFreeStart(plan, facts, within);
  return clashes.map((clash) =>
    clashInWords(plan, facts, clash, findRemedies(plan, facts, clash, freeStart)),
  );
}
