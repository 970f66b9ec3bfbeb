import "server-only";
import { and, desc, eq, inArray, isNull } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import { callbackInvitations, callbackRounds, productions } from "@/db/schema";
import { recordAudit } from "@/lib/data/audit";
import { inTransaction } from "@/lib/data/transaction";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";
import type { answerCallbackSchema } from "@/lib/schemas/callbacks";

export type OwnCallback = {
  invitationId: string;
  productionId: string;
  production: string;
  roles: string[];
  startsAt: Date | null;
  endsAt: Date | null;
  zone: string;
  room: string | null;
  material: string | null;
  answer: "yes" | "no" | null;
  publishedAt: Date;
};

/** What was published to the actor, the newest issue only; nothing of a draft, nothing of anyone else. */
export async function listOwnCallbacks(actor: Actor): Promise<OwnCallback[]> {
  const ids = actor.people.map((p) => p.id);
  if (ids.length === 0) return [];
  const rows = await db
    .select({
      invitationId: callbackInvitations.id,
      productionId: productions.id,
      production: productions.title,
      snapshot: callbackInvitations.snapshot,
      answer: callbackInvitations.answer,
      publishedAt: callbackInvitations.publishedAt,
    })
    .from(callbackInvitations)
    .innerJoin(callbackRounds, eq(callbackRounds.id, callbackInvitations.roundId))
    .innerJoin(productions, eq(productions.id, callbackRounds.productionId))
    .where(
      and(
        inArray(callbackInvitations.personId, ids),
        isNull(callbackInvitations.supersededAt),
        isNull(productions.removedAt),
      ),
    )
    .orderBy(desc(callbackInvitations.publishedAt));
  return rows.map(({ snapshot, ...row }) => ({
    ...row,
    roles: snapshot.roles,
    startsAt: snapshot.startsAt === null ? null : new Date(snapshot.startsAt),
    endsAt: snapshot.endsAt === null ? null : new Date(snapshot.endsAt),
    zone: snapshot.zone,
    room: snapshot.room,
    material: snapshot.material,
  }));
}

/** The actor's own answer to what was published to them; it may be changed until the list changes. */
export async function answerCallback(
  actor: Actor,
  input: z.output<typeof answerCallbackSchema>,
): Promise<void> {
  const [row] = await db
    .select({
      personId: callbackInvitations.personId,
      supersededAt: callbackInvitations.supersededAt,
      companyId: productions.companyId,
      productionId: productions.id,
    })
    .from(callbackInvitations)
    .innerJoin(callbackRounds, eq(callbackRounds.id, callbackInvitations.roundId))
    .innerJoin(productions, eq(productions.id, callbackRounds.productionId))
    .where(eq(callbackInvitations.id, input.invitationId));
  if (!row || !actor.people.some((p) => p.id === row.personId)) throw new AppError("not-found");
  if (row.supersededAt !== null)
    throw new AppError(
      "stale",
      "The list has changed since. Load the page again to see what it says now.",
    );
  await inTransaction(async (tx) => {
    await tx
      .update(callbackInvitations)
      .set({ answer: input.answer, answeredAt: new Date() })
      .where(eq(callbackInvitations.id, input.invitationId));
    await recordAudit(tx, actor, {
      companyId: row.companyId,
      productionId: row.productionId,
      action: "callbacks.answer",
      subjectKind: "invitation",
      subjectId: input.invitationId,
      summary: `Answered a callback: ${input.answer}`,
    });
  });
}
