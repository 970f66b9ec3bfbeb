"use server";

import { revalidatePath } from "next/cache";
import { z } from "zod";
import { defineAction } from "@/lib/auth/define-action";
import { currentSessionToken } from "@/lib/auth/session-cookie";
import * as accountData from "@/lib/data/account";
import { renameUser } from "@/lib/data/productions";
import * as sessionData from "@/lib/data/sessions";
import * as tokenData from "@/lib/data/tokens";
import {
  changeNameSchema,
  createTokenSchema,
  endSessionSchema,
  removePasswordSchema,
  revokeTokenSchema,
  setPasswordSchema,
} from "@/lib/schemas/account";

export const changeName = defineAction({ input: changeNameSchema }, async ({ name }, actor) => {
  await renameUser(actor, name);
  revalidatePath("/", "layout");
});

export const setPassword = defineAction({ input: setPasswordSchema }, async (input, actor) => {
  await accountData.setPassword(actor, input, await currentSessionToken());
  revalidatePath("/account");
});

export const removePassword = defineAction(
  { input: removePasswordSchema },
  async (input, actor) => {
    await accountData.removePassword(actor, input, await currentSessionToken());
    revalidatePath("/account");
  },
);

export const endSession = defineAction(
  { input: endSessionSchema },
  async ({ sessionId }, actor) => {
    await sessionData.endSession(actor, sessionId);
    revalidatePath("/account");
  },
);

export const endOtherSessions = defineAction({ input: z.object({}) }, async (_input, actor) => {
  await sessionData.endOtherSessions(actor, await currentSessionToken());
  revalidatePath("/account");
});

export const createToken = defineAction({ input: createTokenSchema }, async ({ label }, actor) => {
  const token = await tokenData.createToken(actor, label);
  revalidatePath("/account");
  return { token };
});

export const revokeToken = defineAction(
  { input: revokeTokenSchema },
  async ({ tokenId }, actor) => {
    await tokenData.revokeToken(actor, tokenId);
    revalidatePath("/account");
  },
);
