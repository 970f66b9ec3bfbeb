import "server-only";
import { and, eq } from "drizzle-orm";
import { db } from "@/db/client";
import { verificationTokens } from "@/db/schema";

/**
 * Uses a sign-in token up, once: of two requests with the same token only one finds it, because the delete counts the
 * rows it took. Returns the token, or null when it was not there (any more).
 */
export async function takeVerificationToken(params: {
  identifier: string;
  token: string;
}): Promise<{ identifier: string; token: string; expires: Date } | null> {
  const where = and(
    eq(verificationTokens.identifier, params.identifier),
    eq(verificationTokens.token, params.token),
  );
  const [row] = await db.select().from(verificationTokens).where(where);
  if (!row) return null;
  const [result] = await db.delete(verificationTokens).where(where);
  return result.affectedRows === 1 ? row : null;
}
