import { z } from "zod";
import { emailField } from "./common";

/** Where to go after; only paths of our own are followed. */
const toField = z
  .string()
  .max(1000)
  .nullish()
  .transform((to) => to ?? "");

export const requestLinkSchema = z.object({ email: emailField, to: toField });

export const passwordSignInSchema = z.object({
  email: emailField,
  password: z
    .string({ error: "Write your password." })
    .min(1, "Write your password.")
    .max(200, "That is longer than any password here."),
  to: toField,
});

export const acceptInvitationSchema = z.object({ token: z.string().min(1).max(200), to: toField });
