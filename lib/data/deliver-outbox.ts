import "server-only";
import { and, asc, desc, eq, isNull, lte, sql } from "drizzle-orm";
import { db } from "@/db/client";
import { outbox } from "@/db/schema";
import { codeOf } from "@/lib/services/fault";
import { log } from "@/lib/services/log";
import { sendMail } from "@/lib/services/mail/send-mail";
import { writeMessage } from "@/lib/services/mail/templates";
import type { MailTemplates } from "@/lib/services/mail/templates";

const MAX_TRIES = 8;

/**
 * Sends what is due, one message a transaction: the row is locked while it goes out (`skip locked`, so that several
 * instances never take the same one) and marked in the same transaction. Returns how many went out.
 */
export async function deliverOutbox(limit = 50): Promise<number> {
  let sent = 0;
  for (let i = 0; i < limit; i += 1) {
    const more = await deliverOne();
    if (more === "nothing due") break;
    if (more === "sent") sent += 1;
  }
  return sent;
}

async function deliverOne(): Promise<"sent" | "failed" | "nothing due"> {
  return db.transaction(async (tx) => {
    const [mail] = await tx
      .select()
      .from(outbox)
      .where(and(isNull(outbox.sentAt), isNull(outbox.gaveUpAt), lte(outbox.nextTryAt, new Date())))
      // Someone is waiting at the screen for a sign-in link; a batch of invitations can wait for it.
      .orderBy(desc(eq(outbox.template, "sign-in")), asc(outbox.nextTryAt))
      .limit(1)
      .for("update", { skipLocked: true });
    if (!mail) return "nothing due";
    try {
      const template = mail.template as keyof MailTemplates;
      await sendMail(
        mail.toEmail,
        writeMessage(template, mail.data as MailTemplates[typeof template]),
      );
      await tx
        .update(outbox)
        .set({ sentAt: new Date(), data: {}, lastError: null })
        .where(eq(outbox.id, mail.id));
      return "sent";
    } catch (error) {
      const tries = mail.tries + 1;
      const wait = Math.min(3600, 5 * 2 ** tries);
      log.warn({ mail: mail.id, tries, reason: codeOf(error) ?? "unknown" }, "mail not sent");
      await tx
        .update(outbox)
        .set({
          tries,
          nextTryAt: sql`date_add(utc_timestamp(3), interval ${wait} second)`,
          // A link that will not be sent any more does not stay behind either.
          ...(tries >= MAX_TRIES ? { gaveUpAt: new Date(), data: {} } : {}),
          lastError: error instanceof Error ? error.message.slice(0, 500) : "unknown",
        })
        .where(eq(outbox.id, mail.id));
      return "failed";
    }
  });
}
