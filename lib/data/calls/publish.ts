import "server-only";
import { and, eq, sql } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import { calls } from "@/db/schema";
import { describeClashes } from "@/lib/calls/describe-clashes";
import { recordAudit } from "@/lib/data/audit";
import { productionFor } from "@/lib/data/guard";
import type { ProductionScope } from "@/lib/data/guard";
import { inTransaction } from "@/lib/data/transaction";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";
import type { publishCallSchema, restoreCallSchema, seenCallSchema } from "@/lib/schemas/calls";
import { readFacts, startsWithin } from "./facts";
import { ASK_TO_PUBLISH, planSeen, refuseToTellCast, seesCast } from "./hidden";
import { freeOfCall, holdForCall, lockCall, orTaken } from "./hold";
import { readScoreAndCast } from "./needed";
import { savedCalls, savedPlans } from "./saved";
import { callInWords } from "./write";

export type PublishAnswer = { published: true } | { published: false; ask: string[] };

/**
 * Publishes a draft: takes the room and the pianist, or throws `taken` with by what and when. Clashes of people do not
 * stand in the way, but are asked about once: without `despite` the answer lists them and nothing is written. Throws
 * `refused` where publishing would tell the casting to somebody who may not see it.
 */
export async function publishCall(
  actor: Actor,
  input: z.output<typeof publishCallSchema>,
): Promise<PublishAnswer> {
  const scope = await productionFor(actor, input.productionId, "calls:change");
  const call = await callToHold(scope, input.callId);
  await refuseToTellCast(actor, scope, input, ASK_TO_PUBLISH);
  if (!input.despite) {
    const ask = await clashesToAsk(actor, scope, input.callId);
    if (ask.length > 0) return { published: false, ask };
  }
  await orTaken(scope, call, () =>
    inTransaction(async (tx) => {
      const locked = await lockCall(tx, scope.id, input.callId, input.version);
      if (locked.state === "published")
        throw new AppError("stale", "This call is published already. Load it again.");
      if (locked.state === "cancelled")
        throw new AppError("refused", "This call is cancelled. Restore it first, then publish.");
      await holdForCall(tx, scope.id, { ...call, ...timesOf(locked) });
      await tx
        .update(calls)
        .set({ state: "published", version: sql`${calls.version} + 1` })
        .where(eq(calls.id, locked.id));
      await audit(tx, actor, scope, "call.publish", "Published", locked);
    }),
  );
  return { published: true };
}

/** Cancels a call and frees its room and pianist. Returns what is needed to take that back. */
export async function cancelCall(
  actor: Actor,
  input: z.output<typeof seenCallSchema>,
): Promise<{ was: "draft" | "published"; version: number }> {
  const scope = await productionFor(actor, input.productionId, "calls:change");
  return inTransaction(async (tx) => {
    const call = await lockCall(tx, scope.id, input.callId, input.version);
    if (call.state === "cancelled")
      throw new AppError("stale", "This call is cancelled already. Load it again.");
    await freeOfCall(tx, call.id);
    await tx
      .update(calls)
      .set({ state: "cancelled", version: sql`${calls.version} + 1` })
      .where(eq(calls.id, call.id));
    await audit(tx, actor, scope, "call.cancel", "Cancelled", call);
    return { was: call.state, version: call.version + 1 };
  });
}

/** Takes a cancelling back: as a draft, or published again while room and pianist are still free (else `taken`). */
export async function restoreCall(
  actor: Actor,
  input: z.output<typeof restoreCallSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "calls:change");
  const call = await callToHold(scope, input.callId);
  if (input.to === "published") await refuseToTellCast(actor, scope, input, ASK_TO_PUBLISH);
  await orTaken(scope, call, () =>
    inTransaction(async (tx) => {
      const locked = await lockCall(tx, scope.id, input.callId, input.version);
      if (locked.state !== "cancelled")
        throw new AppError("stale", "This call stands again already. Load it again.");
      if (input.to === "published")
        await holdForCall(tx, scope.id, { ...call, ...timesOf(locked) });
      await tx
        .update(calls)
        .set({ state: input.to, version: sql`${calls.version} + 1` })
        .where(eq(calls.id, locked.id));
      await audit(tx, actor, scope, "call.restore", "Restored", locked);
    }),
  );
}

type Locked = Awaited<ReturnType<typeof lockCall>>;

const timesOf = ({ roomId, pianistId, startsAt, endsAt }: Locked) => ({
  roomId,
  pianistId,
  startsAt,
  endsAt,
});

async function callToHold(scope: ProductionScope, callId: string) {
  const [call] = await db
    .select({
      callId: calls.id,
      roomId: calls.roomId,
      pianistId: calls.pianistId,
      startsAt: calls.startsAt,
      endsAt: calls.endsAt,
    })
    .from(calls)
    .where(and(eq(calls.id, callId), eq(calls.productionId, scope.id)));
  if (!call) throw new AppError("not-found");
  return call;
}

/** The clashes of people, in words; the room's and the pianist's are refused by the database itself. */
async function clashesToAsk(
  actor: Actor,
  scope: ProductionScope,
  callId: string,
): Promise<string[]> {
  const saved = await savedCalls(scope.id, eq(calls.id, callId));
  const { plans } = await savedPlans(await readScoreAndCast(db, scope.id), saved);
  const whole = plans.get(callId);
  if (!whole) return [];
  const castHidden = !seesCast(actor, scope);
  const plan = planSeen(whole, "draft", castHidden);
  const facts = await readFacts(scope, [plan], { castHidden });
  return describeClashes(plan, facts, startsWithin(plan))
    .filter((clash) => clash.kind !== "room" && clash.kind !== "pianist")
    .map((clash) => clash.words);
}

async function audit(
  tx: Parameters<typeof recordAudit>[0],
  actor: Actor,
  scope: ProductionScope,
  action: string,
  verb: string,
  call: Locked,
): Promise<void> {
  await recordAudit(tx, actor, {
    companyId: scope.companyId,
    productionId: scope.id,
    action,
    subjectKind: "call",
    subjectId: call.id,
    summary: `${verb}: ${callInWords(call.kind, { from: call.startsAt, to: call.endsAt, zone: scope.zone })}`,
  });
}
