import "server-only";
import { and, asc, eq, inArray, isNull } from "drizzle-orm";
import { db } from "@/db/client";
import type { Db, Tx } from "@/db/client";
import { newId } from "@/db/columns";
import { companies, passwordHashes, people, positions, productions, sessions } from "@/db/schema";
import { hashPassword, verifyPassword } from "@/lib/auth/password";
import { passwordWeakness } from "@/lib/auth/password-weakness";
import { AppError } from "@/lib/errors";
import { POSITION_NAMES } from "@/lib/permissions/position-kinds";
import type { Actor } from "@/lib/permissions/types";
import { queueMail } from "./outbox";
import { countTry, RATES } from "./rate-limit";
import { deleteOtherSessions } from "./sessions";
import { inTransaction } from "./transaction";

/** So long after signing in the address is as good a proof as the password. */
const FRESH_MS = 60 * 60_000;

export type Account = {
  name: string;
  email: string;
  passwordSetAt: Date | null;
  /** What each company has written down of this person. */
  records: {
    company: string;
    name: string;
    email: string | null;
    phone: string | null;
    pronouns: string | null;
    positions: string[];
  }[];
};

/** What the account page shows: the login's own, and what companies keep of its owner. */
export async function readAccount(actor: Actor): Promise<Account> {
  const [password] = await db
    .select({ updatedAt: passwordHashes.updatedAt })
    .from(passwordHashes)
    .where(eq(passwordHashes.userId, actor.userId));
  return {
    name: actor.name,
    email: actor.email,
    passwordSetAt: password?.updatedAt ?? null,
    records: await readRecords(actor),
  };
}

async function readRecords(actor: Actor): Promise<Account["records"]> {
  const own = actor.people.map((p) => p.id);
  if (own.length === 0) return [];
  const rows = await db
    .select({
      personId: people.id,
      company: companies.name,
      name: people.name,
      email: people.email,
      phone: people.phone,
      pronouns: people.pronouns,
      kind: positions.kind,
      production: productions.title,
    })
    .from(people)
    .innerJoin(companies, eq(companies.id, people.companyId))
    .leftJoin(positions, and(eq(positions.personId, people.id), isNull(positions.endedAt)))
    .leftJoin(
      productions,
      and(eq(productions.id, positions.productionId), isNull(productions.removedAt)),
    )
    .where(inArray(people.id, own))
    .orderBy(asc(companies.name), asc(productions.title), asc(positions.kind));
  const records = new Map<string, Account["records"][number]>();
  for (const { personId, kind, production, ...record } of rows) {
    const entry = records.get(personId) ?? { ...record, positions: [] };
    if (kind !== null)
      entry.positions.push(
        production === null ? POSITION_NAMES[kind] : `${POSITION_NAMES[kind]}, ${production}`,
      );
    records.set(personId, entry);
  }
  return [...records.values()];
}

/**
 * Sets or changes the actor's password, ends their other sessions and tells them by mail. A change needs the present
 * password, or a session that began within the hour. Throws `invalid` (a weak one, with what to do), `refused` or `too-many`.
 */
export async function setPassword(
  actor: Actor,
  input: { current: string; password: string },
  currentToken: string | null,
): Promise<void> {
  const weakness = passwordWeakness(input.password, { email: actor.email, name: actor.name });
  if (weakness !== null)
    throw new AppError("invalid", undefined, { fields: { password: weakness } });
  await proveOwner(actor, input.current, currentToken);
  // Slow on purpose: before the transaction, so that no lock waits for it.
  const hash = await hashPassword(input.password);
  await inTransaction(async (tx) => {
    await tx
      .insert(passwordHashes)
      .values({ userId: actor.userId, hash })
      .onDuplicateKeyUpdate({ set: { hash, updatedAt: new Date() } });
    await tellChanged(tx, actor, currentToken);
  });
}

/** Removes the password: from then on only links by e-mail sign in. The same proof, mail and end of other sessions as a change. */
export async function removePassword(
  actor: Actor,
  input: { current: string },
  currentToken: string | null,
): Promise<void> {
  await proveOwner(actor, input.current, currentToken);
  await inTransaction(async (tx) => {
    const [result] = await tx.delete(passwordHashes).where(eq(passwordHashes.userId, actor.userId));
    if (result.affectedRows === 0)
      throw new AppError("refused", "There is no password to remove: you sign in by e-mail link.");
    await tellChanged(tx, actor, currentToken);
  });
}

/** Whether changing the password asks for the present one: it is set, and the session is older than an hour. */
export async function asksForPassword(actor: Actor, currentToken: string | null): Promise<boolean> {
  const [password] = await db
    .select({ userId: passwordHashes.userId })
    .from(passwordHashes)
    .where(eq(passwordHashes.userId, actor.userId));
  return password !== undefined && !(await isFresh(actor, currentToken));
}

/** An unlocked phone that someone left lying about must not be enough to take an account over. */
async function proveOwner(
  actor: Actor,
  current: string,
  currentToken: string | null,
): Promise<void> {
  const [password] = await db
    .select({ hash: passwordHashes.hash })
    .from(passwordHashes)
    .where(eq(passwordHashes.userId, actor.userId));
  if (!password || (await isFresh(actor, currentToken))) return;
  await countTry(RATES.passwordOfAccount, actor.email);
  if (current !== "" && (await verifyPassword(current, password.hash))) return;
  const message =
    "Write the password you have now. Forgotten? Sign out, sign in with a link by e-mail, and change it within the hour.";
  throw new AppError("invalid", undefined, { fields: { current: message } });
}

async function isFresh(actor: Actor, currentToken: string | null): Promise<boolean> {
  if (currentToken === null) return false;
  const [session] = await db
    .select({ createdAt: sessions.createdAt })
    .from(sessions)
    .where(and(eq(sessions.sessionToken, currentToken), eq(sessions.userId, actor.userId)));
  return session !== undefined && Date.now() - session.createdAt.getTime() < FRESH_MS;
}

async function tellChanged(tx: Db | Tx, actor: Actor, currentToken: string | null): Promise<void> {
  await deleteOtherSessions(tx, actor, currentToken);
  await queueMail(tx, {
    companyId: null,
    to: actor.email,
    template: "password-changed",
    data: { name: actor.name },
    dedupeKey: `password-changed:${newId()}`,
  });
}
