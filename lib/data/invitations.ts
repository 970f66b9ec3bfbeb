import "server-only";
import { and, eq, isNull } from "drizzle-orm";
import { db } from "@/db/client";
import type { Db, Tx } from "@/db/client";
import { newId } from "@/db/columns";
import { companies, invitations, people, pianistSessions, positions, productions, users } from "@/db/schema";
import { hashToken, newSecret } from "@/lib/auth/hash-token";
import { env } from "@/lib/env";
import { AppError } from "@/lib/errors";
import { POSITION_NAMES } from "@/lib/permissions/position-kinds";
import type { Actor, PositionKind } from "@/lib/permissions/types";
import { queueMail } from "./outbox";
import { inTransaction } from "./transaction";

const DAYS_GOOD = 30;

/**
 * Makes a link by which the person of a position accepts it and is signed in (it came to their address, as a sign-in
 * link would). Returns the address of the page; only the hash of the secret is kept.
 */
export async function makeInvitationLink(
  tx: Db | Tx,
  actor: Pick<Actor, "userId">,
  invitation: { positionId: string; email: string; to?: string },
): Promise<string> {
  const secret = newSecret();
  await tx.insert(invitations).values({
    id: newId(),
    positionId: invitation.positionId,
    email: invitation.email,
    tokenHash: hashToken(secret),
    invitedBy: actor.userId,
    expiresAt: new Date(Date.now() + DAYS_GOOD * 86_400_000),
  });
  const url = new URL(`/invitation/${secret}`, env().AUTH_URL);
  if (invitation.to) url.searchParams.set("to", invitation.to);
  return url.toString();
}

/** Queues the invitation into a position. */
export async function sendInvitation(
  tx: Db | Tx,
  actor: Actor,
  invitation: { positionId: string; companyId: string; companyName: string; productionTitle: string | null; kind: PositionKind; name: string; email: string },
): Promise<void> {
  const link = await makeInvitationLink(tx, actor, invitation);
  await queueMail(tx, {
    companyId: invitation.companyId,
    to: invitation.email,
    template: "invitation",
    data: {
      name: invitation.name,
      company: invitation.companyName,
      production: invitation.productionTitle,
      position: POSITION_NAMES[invitation.kind],
      link,
      from: actor.name,
    },
    dedupeKey: `invitation:${hashToken(link)}`,
  });
}

export type InvitationShown = { company: string; production: string | null; position: string; name: string; email: string };

async function openInvitation(secret: string) {
  const [row] = await db
    .select({
      id: invitations.id,
      email: invitations.email,
      expiresAt: invitations.expiresAt,
      acceptedAt: invitations.acceptedAt,
      endedAt: positions.endedAt,
      kind: positions.kind,
      personId: people.id,
      personName: people.name,
      personUserId: people.userId,
      companyId: companies.id,
      company: companies.name,
      production: productions.title,
    })
    .from(invitations)
    .innerJoin(positions, eq(positions.id, invitations.positionId))
    .innerJoin(people, eq(people.id, positions.personId))
    .innerJoin(companies, eq(companies.id, positions.companyId))
    .leftJoin(productions, eq(productions.id, positions.productionId))
    .where(eq(invitations.tokenHash, hashToken(secret)));
  if (!row || row.endedAt !== null) throw new AppError("not-found");
  if (row.acceptedAt !== null) throw new AppError("refused", "This invitation was accepted already. Sign in with your e-mail address.");
  if (row.expiresAt < new Date()) throw new AppError("refused", "This invitation has run out. Ask the company to send it again.");
  return row;
}

/** What an invitation says, for the page that asks to accept it. Throws `not-found` or `refused` with what to do. */
export async function showInvitation(secret: string): Promise<InvitationShown> {
  const row = await openInvitation(secret);
  return { company: row.company, production: row.production, position: POSITION_NAMES[row.kind], name: row.personName, email: row.email };
}

/**
 * Accepts an invitation, once: makes or finds the login of the address it was sent to, links the company's record to it
 * and returns the login's id. Throws when it was used, ran out, or the record belongs to another login.
 */
export async function acceptInvitation(secret: string): Promise<string> {
  const row = await openInvitation(secret);
  return inTransaction(async (tx) => {
    const [taken] = await tx
      .update(invitations)
      .set({ acceptedAt: new Date() })
      .where(and(eq(invitations.id, row.id), isNull(invitations.acceptedAt)));
    if (taken.affectedRows === 0) throw new AppError("refused", "This invitation was accepted already. Sign in with your e-mail address.");
    const [user] = await tx.select({ id: users.id }).from(users).where(eq(users.email, row.email)).for("update");
    const userId = user?.id ?? newId();
    if (user) await tx.update(users).set({ emailVerified: new Date() }).where(eq(users.id, userId));
    else await tx.insert(users).values({ id: userId, email: row.email, name: row.personName, emailVerified: new Date() });
    if (row.personUserId !== null && row.personUserId !== userId) {
      throw new AppError("refused", "This record is already linked to another sign-in. Ask the company to invite the right address.");
    }
    await tx.update(people).set({ userId }).where(eq(people.id, row.personId));
    // From now on the login is what cannot be in two places, across companies.
    await tx.update(pianistSessions).set({ bookeeId: userId }).where(eq(pianistSessions.personId, row.personId));
    return userId;
  });
}
