import "server-only";
import { and, asc, eq, gt, inArray, isNull } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import type { Db, Tx } from "@/db/client";
import { newId } from "@/db/columns";
import { invitations, people, positions } from "@/db/schema";
import { AppError } from "@/lib/errors";
import { can } from "@/lib/permissions/can";
import { POSITION_NAMES } from "@/lib/permissions/position-kinds";
import type { Actor, PositionKind } from "@/lib/permissions/types";
import type { endPositionSchema, invitePersonSchema } from "@/lib/schemas/people";
import { recordAudit } from "./audit";
import { companyFor, productionFor } from "./guard";
import { sendInvitation } from "./invitations";
import { countTry, RATES } from "./rate-limit";
import { duplicateKey, inTransaction } from "./transaction";

export type NewPerson = {
  name: string;
  email: string | null;
  phone?: string | null | undefined;
  pronouns?: string | null | undefined;
  minor?: boolean | undefined;
};

/** The company's record of the person with this address, made if there is none. An existing record keeps its name. */
export async function findOrCreatePerson(
  tx: Db | Tx,
  companyId: string,
  person: NewPerson,
): Promise<{ id: string; created: boolean }> {
  if (person.email !== null) {
    const [known] = await tx
      .select({ id: people.id, removedAt: people.removedAt })
      .from(people)
      .where(and(eq(people.companyId, companyId), eq(people.email, person.email)));
    if (known) {
      if (known.removedAt !== null)
        await tx.update(people).set({ removedAt: null }).where(eq(people.id, known.id));
      return { id: known.id, created: false };
    }
  }
  const id = newId();
  await tx.insert(people).values({
    id,
    companyId,
    name: person.name,
    email: person.email,
    phone: person.phone ?? null,
    pronouns: person.pronouns ?? null,
    minor: person.minor ?? false,
  });
  return { id, created: true };
}

/** The person's open position of this kind in the production (or the company), made if there is none. Returns its id. */
export async function ensurePosition(
  tx: Db | Tx,
  position: {
    companyId: string;
    productionId: string | null;
    personId: string;
    kind: PositionKind;
  },
): Promise<string> {
  const [held] = await tx
    .select({ id: positions.id })
    .from(positions)
    .where(
      and(
        eq(positions.personId, position.personId),
        eq(positions.kind, position.kind),
        position.productionId === null
          ? isNull(positions.productionId)
          : eq(positions.productionId, position.productionId),
        isNull(positions.endedAt),
      ),
    );
  if (held) return held.id;
  const id = newId();
  await tx.insert(positions).values({ id, ...position });
  return id;
}

/** Puts someone into a position and sends the invitation. Returns the person's id. */
export async function invitePerson(
  actor: Actor,
  input: z.output<typeof invitePersonSchema>,
): Promise<string> {
  const scope =
    input.productionId === null
      ? { ...(await companyFor(actor, input.companyId, "members:manage")), title: null }
      : await productionFor(actor, input.productionId, "positions:manage");
  const companyId = "companyId" in scope ? scope.companyId : scope.id;
  const companyName = "companyName" in scope ? scope.companyName : scope.name;
  if (companyId !== input.companyId) throw new AppError("not-found");
  await countTry(RATES.invitesOfUser, actor.userId);
  try {
    return await inTransaction(async (tx) => {
      const person = await findOrCreatePerson(tx, companyId, input);
      const positionId = await ensurePosition(tx, {
        companyId,
        productionId: input.productionId,
        personId: person.id,
        kind: input.kind,
      });
      await sendInvitation(tx, actor, {
        positionId,
        companyId,
        companyName,
        productionTitle: scope.title,
        kind: input.kind,
        name: input.name,
        email: input.email,
      });
      await recordAudit(tx, actor, {
        companyId,
        productionId: input.productionId ?? undefined,
        action: "position.invite",
        subjectKind: "person",
        subjectId: person.id,
        summary: `Invited ${input.name} as ${POSITION_NAMES[input.kind].toLowerCase()}`,
      });
      return person.id;
    });
  } catch (error) {
    if (duplicateKey(error) !== null)
      throw new AppError(
        "stale",
        "Someone invited this person at the same moment. Load the page again.",
      );
    throw error;
  }
}

/** Ends a position: from then on it gives nothing. The last music director of a production cannot be ended. */
export async function endPosition(
  actor: Actor,
  input: z.output<typeof endPositionSchema>,
): Promise<void> {
  const [position] = await db
    .select()
    .from(positions)
    .where(and(eq(positions.id, input.positionId), isNull(positions.endedAt)));
  if (!position || !can(actor, "company:see", { companyId: position.companyId }))
    throw new AppError("not-found");
  if (position.productionId === null) await companyFor(actor, position.companyId, "members:manage");
  else await productionFor(actor, position.productionId, "positions:manage");
  await inTransaction(async (tx) => {
    const same = await tx
      .select({ id: positions.id })
      .from(positions)
      .where(
        and(
          eq(positions.companyId, position.companyId),
          position.productionId === null
            ? isNull(positions.productionId)
            : eq(positions.productionId, position.productionId),
          eq(positions.kind, position.kind),
          isNull(positions.endedAt),
        ),
      )
      .for("update");
    if (
      same.length <= 1 &&
      (position.kind === "music_director" || position.kind === "company_admin")
    ) {
      throw new AppError(
        "refused",
        `Someone has to be ${POSITION_NAMES[position.kind].toLowerCase()}. Invite the next one first.`,
      );
    }
    await tx.update(positions).set({ endedAt: new Date() }).where(eq(positions.id, position.id));
    await recordAudit(tx, actor, {
      companyId: position.companyId,
      productionId: position.productionId ?? undefined,
      action: "position.end",
      subjectKind: "position",
      subjectId: position.id,
      summary: `Ended a position: ${POSITION_NAMES[position.kind].toLowerCase()}`,
    });
  });
}

/** Opens an ended position again: the undo of `endPosition`. */
export async function reopenPosition(
  actor: Actor,
  input: z.output<typeof endPositionSchema>,
): Promise<void> {
  const [position] = await db.select().from(positions).where(eq(positions.id, input.positionId));
  if (!position || !can(actor, "company:see", { companyId: position.companyId }))
    throw new AppError("not-found");
  if (position.productionId === null) await companyFor(actor, position.companyId, "members:manage");
  else await productionFor(actor, position.productionId, "positions:manage");
  // Pressed twice: it is open already.
  if (position.endedAt === null) return;
  try {
    await inTransaction(async (tx) => {
      await tx.update(positions).set({ endedAt: null }).where(eq(positions.id, position.id));
      await recordAudit(tx, actor, {
        companyId: position.companyId,
        productionId: position.productionId ?? undefined,
        action: "position.reopen",
        subjectKind: "position",
        subjectId: position.id,
        summary: `Opened a position again: ${POSITION_NAMES[position.kind].toLowerCase()}`,
      });
    });
  } catch (error) {
    if (duplicateKey(error) !== null)
      throw new AppError("stale", "This person holds that position again already.");
    throw error;
  }
}

export type PersonListed = {
  positionId: string;
  personId: string;
  name: string;
  pronouns: string | null;
  kind: PositionKind;
  /** Null when the reader may not see contacts. */
  email: string | null;
  phone: string | null;
  /** Joined: signs in already. Invited: has an invitation that has not run out. */
  standing: "joined" | "invited" | "not invited";
};

/** Who holds which open position in the production; contacts only for those who may see them. */
export async function listProductionPeople(
  actor: Actor,
  productionId: string,
): Promise<PersonListed[]> {
  const scope = await productionFor(actor, productionId, "people:read");
  const contacts = can(actor, "contacts:read", {
    companyId: scope.companyId,
    productionId: scope.id,
  });
  return listPositions(eq(positions.productionId, scope.id), contacts);
}

/** Who holds a position in the company itself. */
export async function listCompanyMembers(actor: Actor, companyId: string): Promise<PersonListed[]> {
  const company = await companyFor(actor, companyId, "members:manage");
  return listPositions(
    and(eq(positions.companyId, company.id), isNull(positions.productionId)),
    true,
  );
}

async function listPositions(
  where: ReturnType<typeof eq> | ReturnType<typeof and>,
  contacts: boolean,
): Promise<PersonListed[]> {
  const rows = await db
    .select({
      positionId: positions.id,
      personId: people.id,
      name: people.name,
      pronouns: people.pronouns,
      kind: positions.kind,
      email: people.email,
      phone: people.phone,
      userId: people.userId,
    })
    .from(positions)
    .innerJoin(people, eq(people.id, positions.personId))
    .where(and(where, isNull(positions.endedAt), isNull(people.removedAt)))
    .orderBy(asc(positions.kind), asc(people.name));
  const invited = await invitedPositions(rows.map((row) => row.positionId));
  return rows.map(({ userId, ...row }) => ({
    ...row,
    email: contacts ? row.email : null,
    phone: contacts ? row.phone : null,
    standing: userId !== null ? "joined" : invited.has(row.positionId) ? "invited" : "not invited",
  }));
}

async function invitedPositions(positionIds: string[]): Promise<Set<string>> {
  if (positionIds.length === 0) return new Set();
  const rows = await db
    .select({ positionId: invitations.positionId })
    .from(invitations)
    .where(
      and(
        inArray(invitations.positionId, positionIds),
        isNull(invitations.acceptedAt),
        gt(invitations.expiresAt, new Date()),
      ),
    );
  return new Set(rows.map((row) => row.positionId));
}
