"use server";

import { redirect } from "next/navigation";
import { z } from "zod";
import { definePublicAction } from "@/lib/auth/define-action";
import { clearSessionCookie, currentSessionToken } from "@/lib/auth/session-cookie";
import { deleteSession } from "@/lib/data/sessions";

/** Ends this session: the row goes, then the cookie. Works for someone whose session has run out, too. */
export const signOut = definePublicAction({ input: z.void() }, async () => {
  const token = await currentSessionToken();
  if (token) await deleteSession(token);
  await clearSessionCookie();
  redirect("/");
});
