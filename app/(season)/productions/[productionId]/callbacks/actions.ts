"use server";

import { revalidatePath } from "next/cache";
import { defineAction } from "@/lib/auth/define-action";
import * as drafts from "@/lib/data/callbacks/draft";
import * as publishing from "@/lib/data/callbacks/publish";
import {
  changeRoundSchema,
  markSchema,
  publishRoundSchema,
  startRoundSchema,
} from "@/lib/schemas/callbacks";

export const startRound = defineAction({ input: startRoundSchema }, async (input, actor) => {
  const roundId = await drafts.startRound(actor, input);
  revalidatePath(`/productions/${input.productionId}/callbacks`);
  return { roundId };
});

export const changeRound = defineAction({ input: changeRoundSchema }, async (input, actor) => {
  await drafts.changeRound(actor, input);
  revalidatePath(`/productions/${input.productionId}/callbacks`);
});

export const setMark = defineAction({ input: markSchema }, (input, actor) =>
  drafts.setMark(actor, input),
);

export const publishRound = defineAction({ input: publishRoundSchema }, async (input, actor) => {
  const counts = await publishing.publishRound(actor, input);
  revalidatePath(`/productions/${input.productionId}/callbacks`);
  return counts;
});
