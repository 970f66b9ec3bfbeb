import "server-only";
import type { Db, Tx } from "@/db/client";
import { auditEvents } from "@/db/schema";
import type { Actor } from "@/lib/permissions/types";

export type AuditEntry = {
  companyId: string;
  productionId?: string | undefined;
  /** `area.verb`, such as "score.import". */
  action: string;
  subjectKind: string;
  subjectId?: string | undefined;
  /** One plain sentence, without private text. */
  summary: string;
  detail?: Record<string, unknown> | undefined;
};

/** Writes who changed what, in the transaction of the change. */
export async function recordAudit(
  tx: Db | Tx,
  actor: Pick<Actor, "userId" | "name"> | null,
  entry: AuditEntry,
): Promise<void> {
  await tx.insert(auditEvents).values({
    companyId: entry.companyId,
    productionId: entry.productionId ?? null,
    userId: actor?.userId ?? null,
    actorName: (actor?.name ?? "At the door").slice(0, 160),
    action: entry.action,
    subjectKind: entry.subjectKind,
    subjectId: entry.subjectId ?? null,
    summary: entry.summary.slice(0, 300),
    detail: entry.detail ?? null,
  });
}
