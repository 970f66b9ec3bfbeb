import "server-only";
import { and, desc, eq, isNull } from "drizzle-orm";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import { apiTokens, users } from "@/db/schema";
import { hashToken, newSecret } from "@/lib/auth/hash-token";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";

const PREFIX = "cem_";

async function insertToken(userId: string, label: string): Promise<string> {
  const token = PREFIX + newSecret();
  await db.insert(apiTokens).values({ id: newId(), userId, label, hash: hashToken(token) });
  return token;
}

/** Makes a personal token; the text is shown once and only its hash is kept. */
export async function createToken(actor: Actor, label: string): Promise<string> {
  return insertToken(actor.userId, label);
}

/** For the command line on the server itself: a token for the login with this address. Throws `not-found`. */
export async function createTokenByEmail(email: string): Promise<string> {
  const [user] = await db
    .select({ id: users.id })
    .from(users)
    .where(eq(users.email, email.trim().toLowerCase()));
  if (!user) throw new AppError("not-found", `Nobody signs in as ${email}.`);
  return insertToken(user.id, "Made on the command line");
}

/** The actor's own tokens that still work, newest first. */
export async function listTokens(
  actor: Actor,
): Promise<{ id: string; label: string; createdAt: Date; lastUsedAt: Date | null }[]> {
  return db
    .select({
      id: apiTokens.id,
      label: apiTokens.label,
      createdAt: apiTokens.createdAt,
      lastUsedAt: apiTokens.lastUsedAt,
    })
    .from(apiTokens)
    .where(and(eq(apiTokens.userId, actor.userId), isNull(apiTokens.revokedAt)))
    .orderBy(desc(apiTokens.createdAt));
}

/** Revokes one of the actor's own tokens. Throws `not-found`. */
export async function revokeToken(actor: Actor, tokenId: string): Promise<void> {
  const [result] = await db
    .update(apiTokens)
    .set({ revokedAt: new Date() })
    .where(
      and(
        eq(apiTokens.id, tokenId),
        eq(apiTokens.userId, actor.userId),
        isNull(apiTokens.revokedAt),
      ),
    );
  if (result.affectedRows === 0) throw new AppError("not-found", "That token is already revoked.");
}

/** The login a token speaks for, or null. Notes when it was last used. */
export async function userOfToken(token: string): Promise<string | null> {
  if (!token.startsWith(PREFIX)) return null;
  const [row] = await db
    .select({ id: apiTokens.id, userId: apiTokens.userId })
    .from(apiTokens)
    .where(and(eq(apiTokens.hash, hashToken(token)), isNull(apiTokens.revokedAt)));
  if (!row) return null;
  await db.update(apiTokens).set({ lastUsedAt: new Date() }).where(eq(apiTokens.id, row.id));
  return row.userId;
}
