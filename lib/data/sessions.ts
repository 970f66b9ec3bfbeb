import "server-only";
import { and, desc, eq, gt, ne } from "drizzle-orm";
import { createHash } from "node:crypto";
import { db } from "@/db/client";
import type { Db, Tx } from "@/db/client";
import { sessions } from "@/db/schema";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";

/** Writes a session row, for sign-in only. */
export async function insertSession(
  session: { sessionToken: string; userId: string; expires: Date },
  device: string,
): Promise<void> {
  await db.insert(sessions).values({ ...session, device: device.slice(0, 120) });
}

// The list names sessions by a fingerprint, so that the page never holds another session's secret.
const fingerprint = (token: string): string =>
  createHash("sha256").update(token).digest("hex").slice(0, 32);

/** The actor's own running sessions, newest first; `current` is the one that asks. */
export async function listSessions(
  actor: Actor,
  currentToken: string | null,
): Promise<{ id: string; device: string; startedAt: Date; current: boolean }[]> {
  const rows = await db
    .select({
      token: sessions.sessionToken,
      device: sessions.device,
      startedAt: sessions.createdAt,
    })
    .from(sessions)
    .where(and(eq(sessions.userId, actor.userId), gt(sessions.expires, new Date())))
    .orderBy(desc(sessions.createdAt));
  return rows.map((row) => ({
    id: fingerprint(row.token),
    device: row.device ?? "An unknown device",
    startedAt: row.startedAt,
    current: row.token === currentToken,
  }));
}

/** Ends one of the actor's own sessions. Throws `not-found` when there is none by that id. */
export async function endSession(actor: Actor, id: string): Promise<void> {
  const rows = await db
    .select({ token: sessions.sessionToken })
    .from(sessions)
    .where(eq(sessions.userId, actor.userId));
  const found = rows.find((row) => fingerprint(row.token) === id);
  if (!found) throw new AppError("not-found", "That session has already ended.");
  await db
    .delete(sessions)
    .where(and(eq(sessions.sessionToken, found.token), eq(sessions.userId, actor.userId)));
}

/** Ends all of the actor's sessions but the one that asks. */
export async function endOtherSessions(actor: Actor, currentToken: string | null): Promise<void> {
  await deleteOtherSessions(db, actor, currentToken);
}

/** The same within the transaction of what makes it necessary. */
export async function deleteOtherSessions(
  tx: Db | Tx,
  actor: Actor,
  currentToken: string | null,
): Promise<void> {
  await tx
    .delete(sessions)
    .where(
      currentToken === null
        ? eq(sessions.userId, actor.userId)
        : and(eq(sessions.userId, actor.userId), ne(sessions.sessionToken, currentToken)),
    );
}

/** Ends the session of a cookie, whoever's it is: only its holder has the token. */
export async function deleteSession(token: string): Promise<void> {
  await db.delete(sessions).where(eq(sessions.sessionToken, token));
}
