import "server-only";
import { and, eq } from "drizzle-orm";
import { db } from "@/db/client";
import { calls } from "@/db/schema";
import { describeClashes } from "@/lib/calls/describe-clashes";
import { attendingRuns } from "@/lib/calls/attending-runs";
import { findCallClashes } from "@/lib/calls/find-call-clashes";
import type { CallFacts, CallPlan, ClashInWords } from "@/lib/calls/types";
import { waitingMinutes } from "@/lib/calls/waiting-minutes";
import { productionFor } from "@/lib/data/guard";
import type { ProductionScope } from "@/lib/data/guard";
import { AppError } from "@/lib/errors";
import { clock, clockSpan, daysOrClocks, longDay } from "@/lib/format-dates";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import { overlaps } from "@/lib/schedule/overlaps";
import { whoIsNeeded } from "@/lib/schedule/who-is-needed";
import type { CallDraft } from "@/lib/schemas/calls";
import { shownPeople } from "./check";
import type { CheckedPerson } from "./check";
import { readFacts, startsWithin } from "./facts";
import { planSeen, seesCast, wouldTellCast } from "./hidden";
import { readScoreAndCast } from "./needed";
import type { ScoreAndCast } from "./needed";
import { draftOf, savedCalls, savedPlans } from "./saved";
import type { SavedCall } from "./saved";

export type CallBlockRead = {
  key: string;
  kind: CallPlan["blocks"][number]["kind"];
  label: string | null;
  title: string;
  bars: string | null;
  detail: string | null;
  /** Minutes from the call's start, and long. */
  offset: number;
  minutes: number;
  from: string;
  to: string;
  called: CheckedPerson[];
  uncastRoles: string[];
};

export type CallRead = SavedCall & {
  day: string;
  span: string;
  blocks: CallBlockRead[];
  waiting: number;
  mayChange: boolean;
  /** Without seeing the casting, nobody publishes what would tell it. */
  mayPublish: boolean;
  castHidden: boolean;
  /** The call as its form has it; null for those who only read. */
  draft: CallDraft | null;
  /** People the casting of today needs and the call does not call, and the other way round. */
  outOfStep: { needed: string[]; notNeeded: string[] };
};

/** One call with everything its page shows. Drafts and cancelled calls do not exist for those who only read. */
export async function readCall(
  actor: Actor,
  { productionId, callId }: { productionId: string; callId: string },
): Promise<CallRead> {
  const { scope, saved, plan, whole, names, score, mayChange, castHidden } = await loadCall(
    actor,
    productionId,
    callId,
  );
  const maySeeReasons = can(actor, "conflicts:read", {
    companyId: scope.companyId,
    productionId: scope.id,
  });
  return {
    ...saved,
    day: longDay(saved.localDate, scope.locale),
    span: clockSpan(plan.from, plan.to, saved.zone),
    blocks: plan.blocks.map((block) => ({
      key: block.key,
      kind: block.kind,
      label: block.label,
      title: block.title,
      bars: block.bars,
      detail: block.detail,
      offset: Math.round((block.from.getTime() - plan.from.getTime()) / 60_000),
      minutes: block.minutes,
      from: clock(block.from, saved.zone),
      to: clock(block.to, saved.zone),
      called: shownPeople(block, names, maySeeReasons),
      uncastRoles: block.uncastRoles,
    })),
    waiting: castHidden ? 0 : waitingMinutes(plan.blocks),
    mayChange,
    mayPublish: mayChange && (!castHidden || !wouldTellCast(whole, score)),
    castHidden,
    draft: mayChange ? draftOf(saved, plan) : null,
    outOfStep:
      mayChange && !castHidden
        ? await outOfStep(scope, plan, score)
        : { needed: [], notNeeded: [] },
  };
}

/** A call before it is changed: its form and version. */
export async function readCallDraft(
  actor: Actor,
  { productionId, callId }: { productionId: string; callId: string },
): Promise<{ draft: CallDraft; version: number; state: SavedCall["state"] }> {
  const { saved, plan, mayChange } = await loadCall(actor, productionId, callId);
  if (!mayChange) throw new AppError("not-allowed");
  return { draft: draftOf(saved, plan), version: saved.version, state: saved.state };
}

export type CallClashes = {
  clashes: ClashInWords[];
  /** Conflicts on that day that the order of the blocks already goes around. */
  around: string[];
};

/** What a saved call clashes with now, for those who plan calls. */
export async function readCallClashes(
  actor: Actor,
  { productionId, callId }: { productionId: string; callId: string },
): Promise<CallClashes> {
  const { scope, plan, mayChange, castHidden } = await loadCall(actor, productionId, callId);
  if (!mayChange) throw new AppError("not-allowed");
  const facts = await readFacts(scope, [plan], { castHidden });
  return {
    clashes: describeClashes(plan, facts, startsWithin(plan)),
    around: conflictsAround(plan, facts),
  };
}

/** A call as the reader may see it (`plan`) and in whole. */
async function loadCall(actor: Actor, productionId: string, callId: string) {
  const scope = await productionFor(actor, productionId, "calls:read");
  const mayChange = can(actor, "calls:change", {
    companyId: scope.companyId,
    productionId: scope.id,
  });
  const [saved] = await savedCalls(scope.id, and(eq(calls.id, callId)));
  if (!saved || (!mayChange && saved.state !== "published")) throw new AppError("not-found");
  const score = await readScoreAndCast(db, scope.id);
  const { plans, names } = await savedPlans(score, [saved]);
  const whole = plans.get(saved.id);
  if (!whole) throw new AppError("not-found");
  const castHidden = !seesCast(actor, scope);
  const plan = planSeen(whole, saved.state, castHidden);
  return { scope, saved, plan, whole, names, score, mayChange, castHidden };
}

async function outOfStep(
  scope: ProductionScope,
  plan: CallPlan,
  score: ScoreAndCast,
): Promise<CallRead["outOfStep"]> {
  const needs = whoIsNeeded({
    blocks: plan.blocks.map((block) => ({ id: block.key, numberId: block.numberId })),
    lines: score.lines,
    cast: score.cast,
  });
  const needed = new Set<string>();
  const notNeeded = new Set<string>();
  for (const block of plan.blocks) {
    const now = new Set(
      needs.find((need) => need.blockId === block.key)?.people.map((person) => person.personId),
    );
    for (const personId of now)
      if (!block.called.some((person) => person.personId === personId)) needed.add(personId);
    for (const person of block.called)
      if (person.source === "score" && !now.has(person.personId)) notNeeded.add(person.personId);
  }
  if (needed.size === 0 && notNeeded.size === 0) return { needed: [], notNeeded: [] };
  const called = [...needed].map((personId) => ({
    personId,
    roleNames: [],
    source: "score" as const,
    reason: null,
    excused: false,
  }));
  const [block] = plan.blocks;
  // The facts know the names of everyone in a plan: those newly needed are put into one for that.
  const facts = await readFacts(scope, [
    plan,
    ...(block ? [{ ...plan, blocks: [{ ...block, called }] }] : []),
  ]);
  const named = (ids: Set<string>): string[] =>
    [...ids].map((id) => facts.names.get(id) ?? "").sort();
  return { needed: named(needed), notNeeded: named(notNeeded) };
}

function conflictsAround(plan: CallPlan, facts: CallFacts): string[] {
  const met = new Set(findCallClashes(plan, facts).map((clash) => clash.withId));
  const runs = attendingRuns(plan.blocks);
  return facts.conflicts
    .filter(
      (conflict) =>
        !met.has(conflict.id) && overlaps(conflict, plan) && runs.has(conflict.personId),
    )
    .map((conflict) => {
      const name = facts.names.get(conflict.personId) ?? "";
      const theirs = runs.get(conflict.personId) ?? [];
      const after = theirs.every((run) => run.from >= conflict.to);
      const before = theirs.every((run) => run.to <= conflict.from);
      const where = after ? "after it" : before ? "before it" : "around it";
      const why = conflict.reason === null ? "" : ` (${conflict.reason})`;
      return `${name} cannot come ${daysOrClocks(conflict.from, conflict.to, plan.zone)}${why}: their blocks are ${where}.`;
    });
}
