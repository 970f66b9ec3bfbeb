import "server-only";
import { eq } from "drizzle-orm";
import { db } from "@/db/client";
import { calls } from "@/db/schema";
import type { CallPlan } from "@/lib/calls/types";
import type { ProductionScope } from "@/lib/data/guard";
import { AppError } from "@/lib/errors";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import { readScoreAndCast } from "./needed";
import type { HiddenCast, ScoreAndCast } from "./needed";
import { handOf, savedCalls, savedPlans } from "./saved";

/*
 * Calls for those who may not see the casting: the stage manager until the cast list is out, the company admin always.
 *
 * They see whoever is called by hand. Whom the score calls they see in published calls alone, by name and without
 * roles: those people have been told, the call sheet names them, and somebody has to run the call. That holds only
 * because nobody but those who see the casting can bring a person of the score into a published call. So a reader
 * from whom it is hidden cannot publish or restore what roles sing in, cannot add such a number to a published call,
 * and changes the rest of one without its people being worked out again. Whether that is refused depends on the score
 * alone, never on who is cast: a refusal must not tell either.
 */

/** Whether the reader may know who is cast: the stage manager only once the list is out. */
export function seesCast(actor: Actor, scope: ProductionScope): boolean {
  return can(actor, "casting:see", {
    companyId: scope.companyId,
    productionId: scope.id,
    castPublished: scope.castPublished,
  });
}

/**
 * A plan cut down to what may be read without seeing the casting. `standing` is the call as it was published, or null:
 * whom the score calls in its blocks is shown, everyone else of the score is left out, and so are all roles.
 */
export function withoutCast(plan: CallPlan, standing: CallPlan | null): CallPlan {
  return {
    ...plan,
    blocks: plan.blocks.map((block) => {
      const told = new Set(
        standingBlock(standing, block)
          ?.called.filter((person) => !person.excused)
          .map((person) => person.personId),
      );
      return {
        ...block,
        uncastRoles: [],
        called: block.called
          .filter((person) => person.source === "hand" || told.has(person.personId))
          .map((person) => ({ ...person, roleNames: [] })),
      };
    }),
  };
}

/** The same for a saved call, from its own state; those who see the casting get it whole. */
export function planSeen(plan: CallPlan, state: string, hidden: boolean): CallPlan {
  return hidden ? withoutCast(plan, state === "published" ? plan : null) : plan;
}

/** A block as it was before, while it is of the same number. */
export function standingBlock(
  standing: CallPlan | null,
  block: { key: string; numberId: string | null },
): CallPlan["blocks"][number] | undefined {
  return standing?.blocks.find((one) => one.key === block.key && one.numberId === block.numberId);
}

/**
 * What has to be kept of a saved call (none: null) that is planned by somebody from whom the casting is hidden. Null
 * for those who see it. With `version`, throws `stale` when the call is not the one they saw.
 */
export async function hiddenCast(
  actor: Actor,
  scope: ProductionScope,
  callId: string | null,
  version?: number,
): Promise<HiddenCast | null> {
  if (seesCast(actor, scope)) return null;
  if (callId === null) return { standing: null, excuses: [] };
  const [saved] = await savedCalls(scope.id, eq(calls.id, callId));
  if (!saved) throw new AppError("not-found");
  if (version !== undefined && saved.version !== version) throw new AppError("stale");
  const { plans } = await savedPlans(await readScoreAndCast(db, scope.id), [saved]);
  const plan = plans.get(saved.id) ?? null;
  return {
    standing: saved.state === "published" ? plan : null,
    excuses: plan === null ? [] : handOf(plan).filter((change) => change.act === "excuse"),
  };
}

export const ASK_TO_PUBLISH =
  "Ask the music director to publish this one: the cast list is not out yet.";
export const ASK_TO_REFRESH =
  "Ask the music director to bring this one up to date: the cast list is not out yet.";
export const ASK_TO_CHANGE =
  "Ask the music director to add a number that is sung to a published call: the cast list is not out yet.";

/** Whether publishing this would tell whom the score calls: a role sings in it, or somebody was called by the score. */
export function wouldTellCast(plan: CallPlan, score: Pick<ScoreAndCast, "lines">): boolean {
  const sung = new Set(score.lines.map((line) => line.numberId));
  return plan.blocks.some(
    (block) =>
      (block.numberId !== null && sung.has(block.numberId)) ||
      block.called.some((person) => person.source === "score"),
  );
}

/**
 * Refuses, with `message`, to somebody from whom the casting is hidden, what would tell it. The call is read again in
 * the version they saw.
 */
export async function refuseToTellCast(
  actor: Actor,
  scope: ProductionScope,
  seen: { callId: string; version: number },
  message: string,
): Promise<void> {
  if (seesCast(actor, scope)) return;
  const [saved] = await savedCalls(scope.id, eq(calls.id, seen.callId));
  if (!saved) throw new AppError("not-found");
  if (saved.version !== seen.version) throw new AppError("stale");
  const score = await readScoreAndCast(db, scope.id);
  const plan = (await savedPlans(score, [saved])).plans.get(saved.id);
  if (plan && wouldTellCast(plan, score)) throw new AppError("refused", message);
}

/** Refuses to bring people of the score into blocks that a published call did not have. */
export function refuseNewlySung(hidden: HiddenCast, plan: CallPlan, score: ScoreAndCast): void {
  const { standing } = hidden;
  if (standing === null) return;
  const fresh = plan.blocks.filter((block) => standingBlock(standing, block) === undefined);
  if (wouldTellCast({ ...plan, blocks: fresh }, score))
    throw new AppError("refused", ASK_TO_CHANGE);
}
