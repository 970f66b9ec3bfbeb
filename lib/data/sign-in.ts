import "server-only";
import { and, desc, eq, isNull } from "drizzle-orm";
import { createHash } from "node:crypto";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import { passwordHashes, people, users } from "@/db/schema";
import { pretendToVerify, verifyPassword } from "@/lib/auth/password";
import { AppError } from "@/lib/errors";
import { queueMail } from "./outbox";
import { countTry, RATES } from "./rate-limit";

/** Queues the mail with a sign-in link. */
export async function createSignInMail(to: string, link: string, minutes: number): Promise<void> {
  const dedupeKey = `sign-in:${createHash("sha256").update(link).digest("base64url")}`;
  await queueMail(db, {
    companyId: null,
    to,
    template: "sign-in",
    data: { link, minutes },
    dedupeKey,
  });
}

/** Makes the login of an address that a link has proved, with the name that a company last wrote beside it, if any has. */
export async function createLogin(
  email: string,
  emailVerified: Date | null,
): Promise<{ id: string; email: string; name: string | null; emailVerified: Date | null }> {
  const [known] = await db
    .select({ name: people.name })
    .from(people)
    .where(and(eq(people.email, email), isNull(people.removedAt)))
    .orderBy(desc(people.createdAt))
    .limit(1);
  const login = { id: newId(), email, name: known?.name ?? null, emailVerified };
  await db.insert(users).values(login);
  return login;
}

/** Counts a request for a sign-in link, per address and per source. Throws `too-many`. */
export async function countSignInMail(email: string, source: string): Promise<void> {
  await countTry(RATES.mailFromSource, source);
  await countTry(RATES.mailToAddress, email);
}

/**
 * The login that fits address and password. An unknown address, one without a password and a wrong password take the same
 * time and give the same answer. Throws `refused` or `too-many`.
 */
export async function checkPassword(
  email: string,
  password: string,
  source: string,
): Promise<string> {
  await countTry(RATES.passwordFromSource, source);
  await countTry(RATES.passwordOfAccount, email);
  const [row] = await db
    .select({ userId: users.id, hash: passwordHashes.hash })
    .from(users)
    .innerJoin(passwordHashes, eq(passwordHashes.userId, users.id))
    .where(eq(users.email, email));
  if (!row) await pretendToVerify(password);
  if (!row || !(await verifyPassword(password, row.hash))) {
    throw new AppError(
      "refused",
      "Address and password do not fit together. Try again, or ask for a link by e-mail.",
    );
  }
  return row.userId;
}
