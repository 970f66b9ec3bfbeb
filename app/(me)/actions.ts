"use server";

import { revalidatePath } from "next/cache";
import { z } from "zod";
import { defineAction } from "@/lib/auth/define-action";
import { answerSlot as writeSlotAnswer } from "@/lib/data/auditions/own";
import { answerCallback as writeCallbackAnswer } from "@/lib/data/callbacks/own";
import * as conflictData from "@/lib/data/conflicts";
import { acceptOwnInvitation } from "@/lib/data/invitations";
import { claimRange as writeRange } from "@/lib/data/ranges";
import { acknowledgeSheet as writeAcknowledgement } from "@/lib/data/sheets/own";
import { answerCallbackSchema } from "@/lib/schemas/callbacks";
import { idField } from "@/lib/schemas/common";
import { addConflictSchema, conflictIdsSchema } from "@/lib/schemas/conflicts";
import { answerSlotSchema } from "@/lib/schemas/me";
import { claimRangeSchema } from "@/lib/schemas/ranges";
import { acknowledgeSheetSchema } from "@/lib/schemas/sheets";

export const answerSlot = defineAction({ input: answerSlotSchema }, async (input, actor) => {
  await writeSlotAnswer(actor, input);
  revalidatePath("/me");
});

export const answerCallback = defineAction(
  { input: answerCallbackSchema },
  async (input, actor) => {
    await writeCallbackAnswer(actor, input);
    revalidatePath("/me");
  },
);

export const acknowledgeSheet = defineAction(
  { input: acknowledgeSheetSchema },
  async ({ issueId }, actor) => {
    await writeAcknowledgement(actor, issueId);
    revalidatePath("/me", "layout");
  },
);

export const claimRange = defineAction({ input: claimRangeSchema }, async (input, actor) => {
  await writeRange(actor, input);
  revalidatePath("/me", "layout");
});

export const addConflict = defineAction({ input: addConflictSchema }, async (input, actor) => {
  const conflictIds = await conflictData.addConflict(actor, input);
  revalidatePath("/me", "layout");
  return { conflictIds };
});

export const removeConflicts = defineAction({ input: conflictIdsSchema }, async (input, actor) => {
  await conflictData.removeConflicts(actor, input);
  revalidatePath("/me", "layout");
});

export const restoreConflicts = defineAction({ input: conflictIdsSchema }, async (input, actor) => {
  await conflictData.restoreConflicts(actor, input);
  revalidatePath("/me", "layout");
});

/** An invitation to the address that is signed in already: no link is needed. */
export const joinCompany = defineAction(
  { input: z.object({ invitationId: idField }) },
  async ({ invitationId }, actor) => {
    await acceptOwnInvitation(actor, invitationId);
    revalidatePath("/me", "layout");
  },
);
