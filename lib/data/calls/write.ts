import "server-only";
import { and, eq, sql } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import type { Tx } from "@/db/client";
import { newId } from "@/db/columns";
import { blocks, called, calls } from "@/db/schema";
import { CALL_KIND_NAMES } from "@/lib/calls/call-kinds";
import type { CallPlan } from "@/lib/calls/types";
import { recordAudit } from "@/lib/data/audit";
import { productionFor } from "@/lib/data/guard";
import type { ProductionScope } from "@/lib/data/guard";
import { inTransaction } from "@/lib/data/transaction";
import { AppError } from "@/lib/errors";
import { clock, localDay, shortDay } from "@/lib/format-dates";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import type { CallDraft, changeCallSchema } from "@/lib/schemas/calls";
import { ASK_TO_REFRESH, hiddenCast, refuseNewlySung, refuseToTellCast } from "./hidden";
import { holdForCall, lockCall, orTaken } from "./hold";
import { planCall, readScoreAndCast } from "./needed";
import { draftOf, savedCalls, savedPlans } from "./saved";

/** Saves a new call as a draft: it holds no room and no pianist yet, and may hold a clash. Returns its id. */
export async function createCall(actor: Actor, draft: CallDraft): Promise<string> {
  const scope = await productionFor(actor, draft.productionId, "calls:change");
  assertMayChoosePianist(actor, scope, draft.pianistId, null);
  const { plan } = await planCall(scope, draft, null, await hiddenCast(actor, scope, null));
  const callId = newId();
  await inTransaction(async (tx) => {
    await tx
      .insert(calls)
      .values({ id: callId, productionId: scope.id, ...columnsOf(draft, plan), zone: scope.zone });
    await writeBlocks(tx, callId, plan);
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "call.create",
      subjectKind: "call",
      subjectId: callId,
      summary: `Made a draft: ${callInWords(draft.kind, plan)}`,
    });
  });
  return callId;
}

/**
 * Changes a call. A published one takes its new room and pianist in the same transaction: when either is taken nothing
 * is changed, and the error says by what. Throws `stale` when someone else changed it since, `refused` when it is cancelled
 * or when it would tell the casting to somebody who may not see it.
 */
export async function changeCall(
  actor: Actor,
  input: z.output<typeof changeCallSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "calls:change");
  const [known] = await db
    .select({ id: calls.id, pianistId: calls.pianistId })
    .from(calls)
    .where(and(eq(calls.id, input.callId), eq(calls.productionId, scope.id)));
  if (!known) throw new AppError("not-found");
  assertMayChoosePianist(actor, scope, input.pianistId, known.pianistId);
  const hidden = await hiddenCast(actor, scope, input.callId, input.version);
  const { plan, score } = await planCall(scope, input, input.callId, hidden);
  if (hidden) refuseNewlySung(hidden, plan, score);
  await savePlan(actor, scope, input, plan, "Changed");
}

/** Makes a call's list again from the score and the casting of today; what was changed by hand stays. */
export async function refreshCall(
  actor: Actor,
  input: { productionId: string; callId: string; version: number },
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "calls:change");
  const [saved] = await savedCalls(scope.id, eq(calls.id, input.callId));
  if (!saved) throw new AppError("not-found");
  await refuseToTellCast(actor, scope, input, ASK_TO_REFRESH);
  const { plans } = await savedPlans(await readScoreAndCast(db, scope.id), [saved]);
  const before = plans.get(saved.id);
  if (!before) throw new AppError("not-found");
  const draft = draftOf(saved, before);
  const { plan } = await planCall(scope, draft, saved.id, await hiddenCast(actor, scope, saved.id));
  await savePlan(
    actor,
    scope,
    { ...draft, callId: saved.id, version: input.version },
    plan,
    "Brought up to date",
  );
}

async function savePlan(
  actor: Actor,
  scope: ProductionScope,
  input: z.output<typeof changeCallSchema>,
  plan: CallPlan,
  verb: string,
): Promise<void> {
  const holding = {
    callId: input.callId,
    roomId: input.roomId,
    pianistId: input.pianistId,
    startsAt: plan.from,
    endsAt: plan.to,
  };
  await orTaken(scope, holding, () =>
    inTransaction(async (tx) => {
      const call = await lockCall(tx, scope.id, input.callId, input.version);
      if (call.state === "cancelled")
        throw new AppError("refused", "This call is cancelled. Restore it first, then change it.");
      await tx
        .update(calls)
        .set({ ...columnsOf(input, plan), version: sql`${calls.version} + 1` })
        .where(eq(calls.id, call.id));
      const kept = await tx
        .select({ id: blocks.id })
        .from(blocks)
        .where(eq(blocks.callId, call.id));
      await tx.delete(blocks).where(eq(blocks.callId, call.id));
      await writeBlocks(tx, call.id, plan, new Set(kept.map((block) => block.id)));
      if (call.state === "published") await holdForCall(tx, scope.id, holding);
      await recordAudit(tx, actor, {
        companyId: scope.companyId,
        productionId: scope.id,
        action: "call.change",
        subjectKind: "call",
        subjectId: call.id,
        summary: `${verb}: ${callInWords(input.kind, plan)}`,
      });
    }),
  );
}

/** Pianists are assigned by the music team; the stage manager keeps whom they chose. */
function assertMayChoosePianist(
  actor: Actor,
  scope: ProductionScope,
  wanted: string | null,
  before: string | null,
): void {
  if (
    wanted === before ||
    can(actor, "pianists:assign", { companyId: scope.companyId, productionId: scope.id })
  )
    return;
  const message = "The music director assigns pianists. Leave this as it is, and ask them.";
  throw new AppError("not-allowed", message, { fields: { pianistId: message } });
}

function columnsOf(draft: CallDraft, plan: CallPlan) {
  return {
    kind: draft.kind,
    title: draft.title,
    startsAt: plan.from,
    endsAt: plan.to,
    localDate: draft.localDate,
    localTime: draft.localTime,
    roomId: draft.roomId,
    leaderId: draft.leaderId,
    pianistId: draft.pianistId,
  };
}

/** A block that was there before keeps its id, so that two issues of a call sheet can be compared. */
async function writeBlocks(
  tx: Tx,
  callId: string,
  plan: CallPlan,
  kept: ReadonlySet<string> = new Set(),
): Promise<void> {
  const rows = plan.blocks.map((block, index) => ({
    row: {
      id: kept.has(block.key) ? block.key : newId(),
      callId,
      place: index + 1,
      kind: block.kind,
      minutes: block.minutes,
      numberId: block.numberId,
      title: block.numberId === null ? block.title : null,
      bars: block.bars,
      detail: block.detail,
    },
    people: block.called,
  }));
  await tx.insert(blocks).values(rows.map(({ row }) => row));
  const people = rows.flatMap(({ row, people: theirs }) =>
    theirs.map(({ personId, source, reason, excused }) => ({
      blockId: row.id,
      personId,
      source,
      reason,
      excused,
    })),
  );
  if (people.length > 0) await tx.insert(called).values(people);
}

/** "music call, Tue 6 Apr, 18:30–21:45". */
export function callInWords(
  kind: keyof typeof CALL_KIND_NAMES,
  time: { from: Date; to: Date; zone: string },
): string {
  const day = shortDay(localDay(time.from, time.zone));
  return `${CALL_KIND_NAMES[kind].toLowerCase()}, ${day}, ${clock(time.from, time.zone)}–${clock(time.to, time.zone)}`;
}
