"use server";

import { revalidatePath } from "next/cache";
import { defineAction } from "@/lib/auth/define-action";
import * as checkData from "@/lib/data/calls/check";
import * as conflictData from "@/lib/data/calls/conflicts";
import * as publishData from "@/lib/data/calls/publish";
import * as callData from "@/lib/data/calls/write";
import {
  changeCallSchema,
  checkCallSchema,
  createCallSchema,
  decideConflictSchema,
  publishCallSchema,
  restoreCallSchema,
  seenCallSchema,
} from "@/lib/schemas/calls";

const refresh = ({ productionId }: { productionId: string }): void =>
  revalidatePath(`/productions/${productionId}`, "layout");

/** Looks at a call that is being made; writes nothing. */
export const checkCall = defineAction({ input: checkCallSchema }, (input, actor) =>
  checkData.checkCall(actor, input),
);

export const createCall = defineAction({ input: createCallSchema }, async (input, actor) => {
  const callId = await callData.createCall(actor, input);
  refresh(input);
  return { callId };
});

export const changeCall = defineAction({ input: changeCallSchema }, async (input, actor) => {
  await callData.changeCall(actor, input);
  refresh(input);
  return { callId: input.callId };
});

export const refreshCall = defineAction({ input: seenCallSchema }, async (input, actor) => {
  await callData.refreshCall(actor, input);
  refresh(input);
});

export const publishCall = defineAction({ input: publishCallSchema }, async (input, actor) => {
  const answer = await publishData.publishCall(actor, input);
  if (answer.published) refresh(input);
  return answer;
});

export const cancelCall = defineAction({ input: seenCallSchema }, async (input, actor) => {
  const cancelled = await publishData.cancelCall(actor, input);
  refresh(input);
  return cancelled;
});

export const restoreCall = defineAction({ input: restoreCallSchema }, async (input, actor) => {
  await publishData.restoreCall(actor, input);
  refresh(input);
});

export const decideConflict = defineAction(
  { input: decideConflictSchema },
  async (input, actor) => {
    const decided = await conflictData.decideConflict(actor, input);
    refresh(input);
    return decided;
  },
);
