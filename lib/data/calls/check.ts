import "server-only";
import { and, eq, inArray } from "drizzle-orm";
import { db } from "@/db/client";
import { calls, people } from "@/db/schema";
import type { CallPlan, ClashInWords, PlannedBlock } from "@/lib/calls/types";
import { describeClashes } from "@/lib/calls/describe-clashes";
import { waitingMinutes } from "@/lib/calls/waiting-minutes";
import { productionFor } from "@/lib/data/guard";
import { AppError } from "@/lib/errors";
import { clock, localDay, longDay } from "@/lib/format-dates";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import type { CallDraft } from "@/lib/schemas/calls";
import { readFacts, startsWithin } from "./facts";
import { hiddenCast, withoutCast } from "./hidden";
import { planCall } from "./needed";
import type { ScoreAndCast } from "./needed";

export type CheckedPerson = {
  personId: string;
  name: string;
  roles: string[];
  source: "score" | "hand";
  reason: string | null;
  excused: boolean;
};

export type CheckedBlock = {
  key: string;
  from: string;
  to: string;
  called: CheckedPerson[];
  uncastRoles: string[];
};

export type CallCheck = {
  day: string;
  from: string;
  to: string;
  minutes: number;
  /** What the clocks do to the start, in words. */
  clockNote: string | null;
  blocks: CheckedBlock[];
  /** Covers whose role sings in the call: called only by choice. */
  covers: { personId: string; name: string; role: string; keys: string[] }[];
  clashes: ClashInWords[];
  /** Singer-minutes between first and last block in which people are not needed. */
  waiting: number;
  /** The reader may not see the casting yet: who is needed by the score is left out. */
  castHidden: boolean;
};

/**
 * A call that is being made, looked at before anything is written: its times, who the score needs, and everything it
 * clashes with, with what to do. For those who may change calls.
 */
export async function checkCall(
  actor: Actor,
  draft: CallDraft & { callId: string | null },
): Promise<CallCheck> {
  const scope = await productionFor(actor, draft.productionId, "calls:change");
  if (draft.callId !== null) {
    const [own] = await db
      .select({ id: calls.id })
      .from(calls)
      .where(and(eq(calls.id, draft.callId), eq(calls.productionId, scope.id)));
    if (!own) throw new AppError("not-found");
  }
  const hidden = await hiddenCast(actor, scope, draft.callId);
  const castHidden = hidden !== null;
  const planned = await planCall(scope, draft, draft.callId, hidden);
  const { score, note } = planned;
  const plan = hidden ? withoutCast(planned.plan, hidden.standing) : planned.plan;
  const facts = await readFacts(scope, [plan], { castHidden });
  const maySeeReasons = can(actor, "conflicts:read", {
    companyId: scope.companyId,
    productionId: scope.id,
  });
  const covers = castHidden ? [] : readCovers(score, plan);
  const names = await namesOf([...facts.names.keys(), ...covers.map(({ personId }) => personId)]);
  const local = (at: Date): string => clock(at, scope.zone);
  return {
    day: longDay(localDay(plan.from, scope.zone), scope.locale),
    from: local(plan.from),
    to: local(plan.to),
    minutes: Math.round((plan.to.getTime() - plan.from.getTime()) / 60_000),
    clockNote: clockNote(note, local(plan.from)),
    blocks: plan.blocks.map((block) => ({
      key: block.key,
      from: local(block.from),
      to: local(block.to),
      called: shownPeople(block, names, maySeeReasons),
      uncastRoles: block.uncastRoles,
    })),
    covers: covers.map((cover) => ({ ...cover, name: names.get(cover.personId) ?? "" })),
    clashes: describeClashes(plan, facts, startsWithin(plan)),
    waiting: castHidden ? 0 : waitingMinutes(plan.blocks),
    castHidden,
  };
}

/** The people of a block by name. Why somebody is let off or called extra is for those who may read conflicts. */
export function shownPeople(
  block: PlannedBlock,
  names: Map<string, string>,
  maySeeReasons: boolean,
): CheckedPerson[] {
  return block.called.map(({ personId, roleNames, source, reason, excused }) => ({
    personId,
    name: names.get(personId) ?? "",
    roles: roleNames,
    source,
    reason: maySeeReasons ? reason : null,
    excused,
  }));
}

function clockNote(note: "skipped" | "repeated" | null, starts: string): string | null {
  if (note === "skipped")
    return `The clocks go forward over that time: the call would start at ${starts}.`;
  if (note === "repeated") return "That time comes twice that night. The first is taken.";
  return null;
}

function readCovers(
  score: ScoreAndCast,
  plan: CallPlan,
): { personId: string; role: string; keys: string[] }[] {
  const called = new Set(
    plan.blocks.flatMap((block) =>
      block.called.filter((person) => !person.excused).map((person) => person.personId),
    ),
  );
  const sings = new Set(score.lines.map((line) => `${line.roleId} ${line.numberId}`));
  const found = score.covers.map(({ roleId, personId }) => ({
    personId,
    role: score.roleNames.get(roleId) ?? "",
    keys: plan.blocks
      .filter((block) => block.numberId !== null && sings.has(`${roleId} ${block.numberId}`))
      .map((block) => block.key),
  }));
  return found.filter((cover) => cover.keys.length > 0 && !called.has(cover.personId));
}

async function namesOf(personIds: string[]): Promise<Map<string, string>> {
  if (personIds.length === 0) return new Map();
  const rows = await db
    .select({ id: people.id, name: people.name })
    .from(people)
    .where(inArray(people.id, personIds));
  return new Map(rows.map((row) => [row.id, row.name]));
}
