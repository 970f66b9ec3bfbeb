import "server-only";
import type { Db, Tx } from "@/db/client";
import { outbox } from "@/db/schema";
import type { MailTemplates } from "@/lib/services/mail/templates";

/**
 * Puts a message into the outbox, in the transaction of what it tells. A second one with the same `dedupeKey` is
 * silently dropped: it is the same message.
 */
export async function queueMail<K extends keyof MailTemplates>(
  tx: Db | Tx,
  mail: {
    companyId: string | null;
    to: string;
    template: K;
    data: MailTemplates[K];
    dedupeKey: string;
  },
): Promise<void> {
  await tx
    .insert(outbox)
    .values({
      companyId: mail.companyId,
      toEmail: mail.to,
      template: mail.template,
      data: mail.data as Record<string, unknown>,
      dedupeKey: mail.dedupeKey,
    })
    .onDuplicateKeyUpdate({ set: { dedupeKey: mail.dedupeKey } });
}
