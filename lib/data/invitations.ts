import "server-only";
import { and, asc, desc, eq, gt, inArray, isNull } from "drizzle-orm";
import type { SQL } from "drizzle-orm";
import { db } from "@/db/client";
import type { Db, Tx } from "@/db/client";
import { newId } from "@/db/columns";
import {
  companies,
  invitations,
  people,
  pianistSessions,
  positions,
  productions,
  users,
} from "@/db/schema";
import { hashToken, newSecret } from "@/lib/auth/hash-token";
import { env } from "@/lib/env";
import { AppError } from "@/lib/errors";
import { POSITION_NAMES } from "@/lib/permissions/position-kinds";
import type { Actor, PositionKind } from "@/lib/permissions/types";
import { queueMail } from "./outbox";
import { duplicateKey, inTransaction } from "./transaction";

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
  invitation: {
    positionId: string;
    companyId: string;
    companyName: string;
    productionTitle: string | null;
    kind: PositionKind;
    name: string;
    email: string;
  },
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

export type InvitationShown = {
  company: string;
  production: string | null;
  position: string;
  name: string;
  email: string;
  from: string | null;
};

const USED = "This invitation was accepted already. Sign in with your e-mail address.";
const RUN_OUT = "This invitation has run out. Ask the company to send it again.";

type OpenInvitation = Awaited<ReturnType<typeof findInvitations>>[number];

function findInvitations(where: SQL | undefined) {
  return db
    .select({
      id: invitations.id,
      email: invitations.email,
      from: users.name,
      expiresAt: invitations.expiresAt,
      acceptedAt: invitations.acceptedAt,
      endedAt: positions.endedAt,
      kind: positions.kind,
      personId: people.id,
      personName: people.name,
      personUserId: people.userId,
      personRemovedAt: people.removedAt,
      companyId: companies.id,
      company: companies.name,
      production: productions.title,
      productionRemovedAt: productions.removedAt,
    })
    .from(invitations)
    .innerJoin(positions, eq(positions.id, invitations.positionId))
    .innerJoin(people, eq(people.id, positions.personId))
    .innerJoin(companies, eq(companies.id, positions.companyId))
    .leftJoin(productions, eq(productions.id, positions.productionId))
    .leftJoin(users, eq(users.id, invitations.invitedBy))
    .where(where)
    .orderBy(asc(companies.name), desc(invitations.createdAt));
}

async function openInvitation(where: SQL | undefined): Promise<OpenInvitation> {
  const [row] = await findInvitations(where);
  if (
    !row ||
    row.endedAt !== null ||
    row.personRemovedAt !== null ||
    row.productionRemovedAt !== null
  )
    throw new AppError("not-found");
  if (row.acceptedAt !== null) throw new AppError("refused", USED);
  if (row.expiresAt < new Date()) throw new AppError("refused", RUN_OUT);
  return row;
}

/** What an invitation says, for the page that asks to accept it. Throws `not-found` or `refused` with what to do. */
export async function showInvitation(secret: string): Promise<InvitationShown> {
  const row = await openInvitation(eq(invitations.tokenHash, hashToken(secret)));
  return {
    company: row.company,
    production: row.production,
    position: POSITION_NAMES[row.kind],
    name: row.personName,
    email: row.email,
    from: row.from,
  };
}

export type Accepted = {
  userId: string;
  /** Whether the address had no login before. Only then may the link itself sign its owner in. */
  newLogin: boolean;
};

/**
 * Accepts an invitation, once: makes or finds the login of the address it was sent to and links the company's record to
 * it. Throws when it was used, ran out, or the record belongs to another login.
 */
export async function acceptInvitation(secret: string): Promise<Accepted> {
  return accept(await openInvitation(eq(invitations.tokenHash, hashToken(secret))));
}

export type OwnInvitation = {
  id: string;
  company: string;
  production: string | null;
  position: string;
  from: string | null;
};

/** The invitations that wait for the actor's address, which a link by e-mail has proved to be theirs. One a position. */
export async function listOwnInvitations(actor: Actor): Promise<OwnInvitation[]> {
  if (!(await hasProvedAddress(actor))) return [];
  const rows = await findInvitations(
    and(
      eq(invitations.email, actor.email),
      isNull(invitations.acceptedAt),
      gt(invitations.expiresAt, new Date()),
      isNull(positions.endedAt),
      isNull(people.removedAt),
      isNull(productions.removedAt),
      isNull(people.userId),
    ),
  );
  const byPosition = new Map(
    rows.map((row) => [`${row.personId} ${row.kind} ${row.production ?? ""}`, row]),
  );
  return [...byPosition.values()].map((row) => ({
    id: row.id,
    company: row.company,
    production: row.production,
    position: POSITION_NAMES[row.kind],
    from: row.from,
  }));
}

/** Accepts an invitation that waits for the actor's own address, without its link. Throws `not-found` when it is not for them. */
export async function acceptOwnInvitation(actor: Actor, invitationId: string): Promise<void> {
  if (!(await hasProvedAddress(actor))) throw new AppError("not-found");
  await accept(
    await openInvitation(and(eq(invitations.id, invitationId), eq(invitations.email, actor.email))),
  );
}

async function hasProvedAddress(actor: Actor): Promise<boolean> {
  const [user] = await db
    .select({ emailVerified: users.emailVerified })
    .from(users)
    .where(eq(users.id, actor.userId));
  return user?.emailVerified != null;
}

async function accept(row: OpenInvitation): Promise<Accepted> {
  try {
    return await inTransaction(async (tx) => {
      const [taken] = await tx
        .update(invitations)
        .set({ acceptedAt: new Date() })
        .where(and(eq(invitations.id, row.id), isNull(invitations.acceptedAt)));
      if (taken.affectedRows === 0) throw new AppError("refused", USED);
      const login = await loginOf(tx, row.email, row.personName);
      const { userId } = login;
      if (row.personUserId !== null && row.personUserId !== userId) {
        throw new AppError(
          "refused",
          "This record is already linked to another sign-in. Ask the company to invite the right address.",
        );
      }
      await tx.update(people).set({ userId }).where(eq(people.id, row.personId));
      // From now on the login is what cannot be in two places, across companies.
      await tx
        .update(pianistSessions)
        .set({ bookeeId: userId })
        .where(eq(pianistSessions.personId, row.personId));
      await closeOtherInvitations(tx, row.personId);
      return login;
    });
  } catch (error) {
    throw acceptError(error) ?? error;
  }
}

/** The login of an address that its owner has just proved, made if there is none. */
async function loginOf(tx: Tx, email: string, name: string): Promise<Accepted> {
  const [user] = await tx
    .select({ id: users.id, name: users.name })
    .from(users)
    .where(eq(users.email, email))
    .for("update");
  if (user) {
    await tx
      .update(users)
      .set({ emailVerified: new Date(), name: user.name ?? name })
      .where(eq(users.id, user.id));
    return { userId: user.id, newLogin: false };
  }
  const id = newId();
  await tx.insert(users).values({ id, email, name, emailVerified: new Date() });
  return { userId: id, newLogin: true };
}

/** Every mail to someone who had not joined carried a link of its own: once one is used, the others are over. */
async function closeOtherInvitations(tx: Tx, personId: string): Promise<void> {
  const theirs = tx
    .select({ id: positions.id })
    .from(positions)
    .where(eq(positions.personId, personId));
  await tx
    .update(invitations)
    .set({ acceptedAt: new Date() })
    .where(and(inArray(invitations.positionId, theirs), isNull(invitations.acceptedAt)));
}

function acceptError(error: unknown): AppError | null {
  switch (duplicateKey(error)) {
    case null:
      return null;
    case "people_company_user":
      return new AppError(
        "refused",
        "You are in this company already, under another record. Ask the company to put the two together.",
      );
    case "pianist_sessions_held":
      return new AppError(
        "refused",
        "You are booked elsewhere at the time of a session of this company. Ask the company to change it, then accept.",
      );
    default:
      return new AppError("stale", "Something changed at the same moment. Load the page again.");
  }
}
