import "server-only";
import { eq, sql } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import { calls, people } from "@/db/schema";
import { recordAudit } from "@/lib/data/audit";
import { holdForCall, lockCall, orTaken } from "@/lib/data/calls/hold";
import { readCallChoices } from "@/lib/data/calls/choices";
import { callInWords } from "@/lib/data/calls/write";
import { productionFor } from "@/lib/data/guard";
import { inTransaction } from "@/lib/data/transaction";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";
import type { assignCallPianistSchema } from "@/lib/schemas/pianists";

/**
 * Has somebody play for a call (null: nobody). A published call takes them at once, or throws `taken` with where they play
 * then; a draft takes them when it is published. Throws `stale` when the call was changed since.
 */
export async function assignCallPianist(
  actor: Actor,
  input: z.output<typeof assignCallPianistSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "pianists:assign");
  if (input.personId !== null) {
    const { pianists } = await readCallChoices(actor, scope.id);
    if (!pianists.some(({ id }) => id === input.personId))
      throw new AppError(
        "not-found",
        "That person does not play for this production any more. Choose another.",
      );
  }
  const [call] = await db
    .select({ startsAt: calls.startsAt, endsAt: calls.endsAt, roomId: calls.roomId })
    .from(calls)
    .where(eq(calls.id, input.callId));
  if (!call) throw new AppError("not-found");
  await orTaken(scope, { callId: input.callId, pianistId: input.personId, ...call }, () =>
    inTransaction(async (tx) => {
      const locked = await lockCall(tx, scope.id, input.callId, input.version);
      if (locked.state === "cancelled")
        throw new AppError("refused", "This call is cancelled: nobody has to play for it.");
      await tx
        .update(calls)
        .set({ pianistId: input.personId, version: sql`${calls.version} + 1` })
        .where(eq(calls.id, locked.id));
      if (locked.state === "published") {
        const { roomId, startsAt, endsAt } = locked;
        await holdForCall(tx, scope.id, {
          callId: locked.id,
          roomId,
          pianistId: input.personId,
          startsAt,
          endsAt,
        });
      }
      const [person] =
        input.personId === null
          ? []
          : await tx
              .select({ name: people.name })
              .from(people)
              .where(eq(people.id, input.personId));
      const what = callInWords(locked.kind, {
        from: locked.startsAt,
        to: locked.endsAt,
        zone: scope.zone,
      });
      await recordAudit(tx, actor, {
        companyId: scope.companyId,
        productionId: scope.id,
        action: "pianist.assign",
        subjectKind: "call",
        subjectId: locked.id,
        summary: person ? `${person.name} plays for a ${what}` : `Nobody plays for a ${what}`,
      });
    }),
  );
}
