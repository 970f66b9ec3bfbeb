"use server";

import { revalidatePath } from "next/cache";
import { defineAction } from "@/lib/auth/define-action";
import * as peopleData from "@/lib/data/people";
import { endPositionSchema, invitePersonSchema } from "@/lib/schemas/people";

const PAGE = "/productions/[productionId]/people";

/** Puts someone into a position and sends the invitation; the same person again only sends it again. */
export const invitePerson = defineAction({ input: invitePersonSchema }, async (input, actor) => {
  const personId = await peopleData.invitePerson(actor, input);
  revalidatePath(PAGE, "page");
  return { personId };
});

export const endPosition = defineAction({ input: endPositionSchema }, async (input, actor) => {
  await peopleData.endPosition(actor, input);
  revalidatePath(PAGE, "page");
});

export const reopenPosition = defineAction({ input: endPositionSchema }, async (input, actor) => {
  await peopleData.reopenPosition(actor, input);
  revalidatePath(PAGE, "page");
});
