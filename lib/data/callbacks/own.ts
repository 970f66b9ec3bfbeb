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

/** The invitations that are the actor's own, in productions where they still are an actor. */
function ownInvitations(actor: Actor) {
  const own = actor.positions.filter((p) => p.kind === "actor" && p.productionId !== null);
  return own.length === 0
    ? null
    : and(
        inArray(
          callbackInvitations.personId,
          own.map((p) => p.personId),
        ),
        inArray(
          callbackRounds.productionId,
          own.flatMap((p) => p.productionId ?? []),
        ),
        isNull(productions.removedAt),
      );
}

/** What was published to the actor, the newest issue only; nothing of a draft, nothing of anyone else. */
export async function listOwnCallbacks(actor: Actor): Promise<OwnCallback[]> {
  const own = ownInvitations(actor);
  if (!own) return [];
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
    .where(and(own, isNull(callbackInvitations.supersededAt)))
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
  const own = ownInvitations(actor);
  if (!own) throw new AppError("not-found");
  const [row] = await db
    .select({ companyId: productions.companyId, productionId: productions.id })
    .from(callbackInvitations)
    .innerJoin(callbackRounds, eq(callbackRounds.id, callbackInvitations.roundId))
    .innerJoin(productions, eq(productions.id, callbackRounds.productionId))
    .where(and(eq(callbackInvitations.id, input.invitationId), own));
  if (!row) throw new AppError("not-found");
  await inTransaction(async (tx) => {
    const [answered] = await tx
      .update(callbackInvitations)
      .set({ answer: input.answer, answeredAt: new Date() })
      .where(
        and(
          eq(callbackInvitations.id, input.invitationId),
          isNull(callbackInvitations.supersededAt),
        ),
      );
    if (answered.affectedRows === 0)
      throw new AppError(
        "stale",
        "The list has changed since. Load the page again to see what it says now.",
      );
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
