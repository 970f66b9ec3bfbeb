"use server";

import { headers } from "next/headers";
import { redirect } from "next/navigation";
import { currentUserId } from "@/lib/auth/current-user";
import { definePublicAction } from "@/lib/auth/define-action";
import { ownPath } from "@/lib/auth/own-path";
import { sendLink } from "@/lib/auth/send-link";
import { signInAs } from "@/lib/auth/sign-in-as";
import { sourceOf } from "@/lib/auth/source-of";
import { acceptInvitation as accept } from "@/lib/data/invitations";
import { countTry, RATES } from "@/lib/data/rate-limit";
import { checkPassword, countSignInMail } from "@/lib/data/sign-in";
import {
  acceptInvitationSchema,
  passwordSignInSchema,
  requestLinkSchema,
} from "@/lib/schemas/sign-in";
import { AFTER_SIGN_IN } from "./after-sign-in";

/** The same answer for every address: nobody learns from it which ones are known. */
export const requestLink = definePublicAction(
  { input: requestLinkSchema },
  async ({ email, to }) => {
    await countSignInMail(email, sourceOf(await headers()));
    await sendLink(email, ownPath(to, AFTER_SIGN_IN));
    redirect("/sign-in/sent");
  },
);

export const signInWithPassword = definePublicAction(
  { input: passwordSignInSchema },
  async ({ email, password, to }) => {
    await signInAs(await checkPassword(email, password, sourceOf(await headers())));
    redirect(ownPath(to, AFTER_SIGN_IN));
  },
);

/**
 * Accepts an invitation. The link came to the address it is for, so it signs in the login it makes; a login that was
 * there before signs in its own way, because invitations live for weeks and get forwarded.
 */
export const acceptInvitation = definePublicAction(
  { input: acceptInvitationSchema },
  async ({ token, to }) => {
    await countTry(RATES.linkFromSource, sourceOf(await headers()));
    const { userId, newLogin } = await accept(token);
    const next = ownPath(to, AFTER_SIGN_IN);
    if (newLogin) await signInAs(userId);
    else if ((await currentUserId()) !== userId) {
      redirect(`/sign-in?to=${encodeURIComponent(next)}`);
    }
    redirect(next);
  },
);
