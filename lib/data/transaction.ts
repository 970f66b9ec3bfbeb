import "server-only";
import { DrizzleQueryError } from "drizzle-orm";
import { db } from "@/db/client";
import type { Tx } from "@/db/client";

/** MariaDB's error numbers that we act on. */
export const DUPLICATE = 1062;
const DEADLOCK = 1213;
const LOCK_WAIT = 1205;

/** The database's error number, or null if the error is none of its. */
export function databaseErrno(error: unknown): number | null {
  const cause = error instanceof DrizzleQueryError ? error.cause : error;
  if (cause instanceof Error && "errno" in cause && typeof cause.errno === "number")
    return cause.errno;
  return null;
}

/** The name of the key that refused a row as a duplicate, or null. */
export function duplicateKey(error: unknown): string | null {
  if (databaseErrno(error) !== DUPLICATE) return null;
  const cause = error instanceof DrizzleQueryError ? error.cause : error;
  const message = cause instanceof Error ? cause.message : "";
  return /for key '(?:[^'.]*\.)?([^']+)'/.exec(message)?.[1] ?? "";
}

/**
 * Runs the work in one transaction, again (up to five times) when the database gave it up for a deadlock or a lock
 * that took too long: the work must therefore do nothing outside the transaction.
 */
export async function inTransaction<T>(work: (tx: Tx) => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await db.transaction(work);
    } catch (error) {
      const errno = databaseErrno(error);
      if ((errno !== DEADLOCK && errno !== LOCK_WAIT) || attempt >= 5) throw error;
      await new Promise((resolve) =>
        setTimeout(resolve, 10 * attempt * attempt + Math.random() * 20),
      );
    }
  }
}
