import "server-only";
import { and, eq, isNull } from "drizzle-orm";
import type { z } from "zod";
import { newId } from "@/db/columns";
import { dayLinks } from "@/db/schema";
import { hashToken, newSecret } from "@/lib/auth/hash-token";
import { env } from "@/lib/env";
import { longDay } from "@/lib/format-dates";
import type { Actor } from "@/lib/permissions/types";
import type { daySchema } from "@/lib/schemas/auditions";
import { recordAudit } from "../audit";
import { productionFor } from "../guard";
import { inTransaction } from "../transaction";
import { lockDay } from "./scope";

/** Makes the monitor's link of a day; an older one stops working. The address is shown once: only its hash is kept. */
export async function makeDoorLink(
  actor: Actor,
  input: z.output<typeof daySchema>,
): Promise<string> {
  const scope = await productionFor(actor, input.productionId, "door:run");
  const secret = newSecret();
  await inTransaction(async (tx) => {
    const day = await lockDay(tx, scope.id, input.dayId);
    await tx
      .update(dayLinks)
      .set({ revokedAt: new Date() })
      .where(and(eq(dayLinks.dayId, day.id), isNull(dayLinks.revokedAt)));
    await tx.insert(dayLinks).values({ id: newId(), dayId: day.id, tokenHash: hashToken(secret) });
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "door.link",
      subjectKind: "audition_day",
      subjectId: day.id,
      summary: `Made the monitor's link for ${longDay(day.localDate, scope.locale)}`,
    });
  });
  return new URL(`/door/${secret}`, env().AUTH_URL).toString();
}

/** Ends the monitor's link of a day at once. */
export async function revokeDoorLink(
  actor: Actor,
  input: z.output<typeof daySchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "door:run");
  await inTransaction(async (tx) => {
    const day = await lockDay(tx, scope.id, input.dayId);
    await tx
      .update(dayLinks)
      .set({ revokedAt: new Date() })
      .where(and(eq(dayLinks.dayId, day.id), isNull(dayLinks.revokedAt)));
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "door.revoke",
      subjectKind: "audition_day",
      subjectId: day.id,
      summary: `Ended the monitor's link for ${longDay(day.localDate, scope.locale)}`,
    });
  });
}
