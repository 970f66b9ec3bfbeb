import "server-only";
import { and, eq, gte, lt, sql } from "drizzle-orm";
import { createHash } from "node:crypto";
import { db } from "@/db/client";
import { rateCounters } from "@/db/schema";
import { AppError } from "@/lib/errors";

export type RateRule = { name: string; limit: number; windowSeconds: number };

/** Mail for signing in: per address and per source. Passwords: per account and per source. */
export const RATES = {
  mailToAddress: { name: "mail-to", limit: 5, windowSeconds: 900 },
  mailFromSource: { name: "mail-from", limit: 40, windowSeconds: 900 },
  passwordOfAccount: { name: "password-of", limit: 8, windowSeconds: 900 },
  passwordFromSource: { name: "password-from", limit: 40, windowSeconds: 900 },
  apiOfToken: { name: "api", limit: 600, windowSeconds: 60 },
  /** Mail to addresses that a person types in: nobody sends from our domain to strangers without end. */
  invitesOfUser: { name: "invites-of", limit: 120, windowSeconds: 3600 },
  bulkInvitesOfUser: { name: "bulk-invites-of", limit: 30, windowSeconds: 3600 },
  companiesOfUser: { name: "companies-of", limit: 10, windowSeconds: 86_400 },
  linkFromSource: { name: "link-from", limit: 120, windowSeconds: 600 },
} as const satisfies Record<string, RateRule>;

/**
 * Counts one try and throws `too-many` (with the seconds to wait) when the window is full. Kept in the database, so that
 * all instances count together; keys are hashed, so that the table names nobody.
 */
export async function countTry(rule: RateRule, who: string): Promise<void> {
  const now = Date.now();
  const windowStart = new Date(
    Math.floor(now / (rule.windowSeconds * 1000)) * rule.windowSeconds * 1000,
  );
  const key = `${rule.name}:${createHash("sha256").update(who).digest("base64url")}`;
  await db
    .insert(rateCounters)
    .values({ key, windowStart, hits: 1 })
    .onDuplicateKeyUpdate({ set: { hits: sql`${rateCounters.hits} + 1` } });
  const [row] = await db
    .select({ hits: rateCounters.hits })
    .from(rateCounters)
    .where(and(eq(rateCounters.key, key), gte(rateCounters.windowStart, windowStart)));
  if ((row?.hits ?? 0) > rule.limit) {
    const retryAfter = Math.ceil((windowStart.getTime() + rule.windowSeconds * 1000 - now) / 1000);
    throw new AppError(
      "too-many",
      `That was tried too often. Wait ${String(Math.ceil(retryAfter / 60))} min and try again.`,
      { retryAfter },
    );
  }
}

/** Forgets windows that are over. Run now and then by the worker. */
export async function sweepRateCounters(): Promise<void> {
  await db
    .delete(rateCounters)
    .where(lt(rateCounters.windowStart, new Date(Date.now() - 86_400_000)));
}
