import { z } from "zod";
import { idField, requiredText } from "./common";

export const PASSWORD_MIN = 12;
const PASSWORD_MAX = 200;

export const changeNameSchema = z.object({
  name: requiredText("your name as people should read it", 160),
});

const currentPassword = z
  .string()
  .max(PASSWORD_MAX, "That is longer than any password here.")
  .nullish()
  .transform((text) => text ?? "");

export const setPasswordSchema = z.object({
  current: currentPassword,
  password: z
    .string({ error: "Write a password." })
    .min(
      PASSWORD_MIN,
      `At least ${String(PASSWORD_MIN)} characters: a few words in a row are easy to keep.`,
    )
    .max(PASSWORD_MAX, `At most ${String(PASSWORD_MAX)} characters.`),
});

export const removePasswordSchema = z.object({ current: currentPassword });

export const endSessionSchema = z.object({
  sessionId: z.string().regex(/^[0-9a-f]{32}$/, "That session has already ended."),
});

export const createTokenSchema = z.object({ label: requiredText("what the token is for", 80) });

export const revokeTokenSchema = z.object({ tokenId: idField });
