import "server-only";
import { and, asc, eq, inArray, sql } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import type { Db, Tx } from "@/db/client";
import { auditionRooms, people, rooms, signUps, slotAssignments, slots, venues } from "@/db/schema";
import { AppError } from "@/lib/errors";
import { longDay } from "@/lib/format-dates";
import type { Actor } from "@/lib/permissions/types";
import type { inviteSingersSchema } from "@/lib/schemas/auditions";
import { writeMessage } from "@/lib/services/mail/templates";
import { recordAudit } from "../audit";
import { productionFor } from "../guard";
import { queueMail } from "../outbox";
import { countTry, RATES } from "../rate-limit";
import { inTransaction } from "../transaction";
import { answerLink, lockSignUps } from "./place";
import { dayOf, lockDay, placeInWords, slotInWords } from "./scope";
import type { DayRow } from "./scope";

export type InvitationPreview = {
  recipients: { signUpId: string; name: string; when: string }[];
  /** Placed, but nobody can write to them. */
  withoutAddress: string[];
  /** What the first of them will read. */
  message: { subject: string; text: string } | null;
};

/** The singers placed on the day who have not been told of it yet, in order of their slots. */
async function toInvite(tx: Db | Tx, day: DayRow, signUpIds: readonly string[] | null) {
  const rows = await tx
    .select({
      signUpId: signUps.id,
      personId: people.id,
      userId: people.userId,
      name: people.name,
      email: people.email,
      startsAt: slots.startsAt,
      room: rooms.name,
      venue: venues.name,
      address: venues.address,
    })
    .from(slotAssignments)
    .innerJoin(slots, eq(slots.id, slotAssignments.slotId))
    .innerJoin(auditionRooms, eq(auditionRooms.id, slots.auditionRoomId))
    .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
    .innerJoin(venues, eq(venues.id, rooms.venueId))
    .innerJoin(signUps, eq(signUps.id, slotAssignments.signUpId))
    .innerJoin(people, eq(people.id, signUps.personId))
    .where(
      and(
        eq(slotAssignments.dayId, day.id),
        eq(signUps.productionId, day.productionId),
        eq(signUps.state, "listed"),
        signUpIds === null ? undefined : inArray(signUps.id, [...signUpIds]),
      ),
    )
    .orderBy(asc(slots.startsAt), asc(rooms.name));
  return rows.map((row) => ({ ...row, localDate: day.localDate, zone: day.zone }));
}

/** What inviting would send, and to whom; sends nothing. */
export async function previewInvitations(
  actor: Actor,
  input: z.output<typeof inviteSingersSchema>,
): Promise<InvitationPreview> {
  const scope = await productionFor(actor, input.productionId, "auditions:plan");
  const day = await dayOf(db, scope.id, input.dayId);
  const rows = await toInvite(db, day, input.signUpIds);
  const reachable = rows.filter((row) => row.email !== null);
  const [first] = reachable;
  const written = first
    ? writeMessage("audition-invitation", {
        name: first.name,
        production: scope.title,
        when: slotInWords(first, scope.locale),
        where: placeInWords(first),
        link: "(each singer's own link)",
      })
    : null;
  return {
    recipients: reachable.map((row) => ({
      signUpId: row.signUpId,
      name: row.name,
      when: slotInWords(row, scope.locale),
    })),
    withoutAddress: rows.filter((row) => row.email === null).map((row) => row.name),
    message: written ? { subject: written.subject, text: written.text } : null,
  };
}

/**
 * Invites singers to their slots by mail: those chosen, or everyone placed on the day and not invited yet. Nobody is
 * invited twice to the same time. `now` is the clock: a day that is over invites nobody. Returns how many were invited.
 */
export async function inviteSingers(
  actor: Actor,
  input: z.output<typeof inviteSingersSchema>,
  now = new Date(),
): Promise<number> {
  const scope = await productionFor(actor, input.productionId, "auditions:plan");
  await countTry(RATES.bulkInvitesOfUser, actor.userId);
  return inTransaction(async (tx) => {
    // The day is locked while its slots are read, so that nobody is told a time they were just moved from, and two people
    // who invite at once send one message.
    const day = await lockDay(tx, scope.id, input.dayId);
    const rows = (await toInvite(tx, day, input.signUpIds)).filter((row) => row.email !== null);
    if (rows.length === 0) return 0;
    await lockSignUps(
      tx,
      scope.id,
      rows.map((row) => row.signUpId),
    );
    if (rows.some((row) => row.startsAt < now)) {
      throw new AppError(
        "refused",
        "Some of these slots have begun already. Move those singers to a later slot, or invite the others one by one.",
      );
    }
    for (const row of rows) {
      if (row.email === null) continue;
      await queueMail(tx, {
        companyId: scope.companyId,
        to: row.email,
        template: "audition-invitation",
        data: {
          name: row.name,
          production: scope.title,
          when: slotInWords(row, scope.locale),
          where: placeInWords(row),
          link: await answerLink(tx, actor, scope.id, row),
        },
        dedupeKey: `audition-invitation:${row.signUpId}:${row.startsAt.toISOString()}`,
      });
      await tx
        .update(signUps)
        .set({ state: "invited", invitedAt: now, version: sql`${signUps.version} + 1` })
        .where(eq(signUps.id, row.signUpId));
    }
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "sign-up.invite",
      subjectKind: "audition_day",
      subjectId: day.id,
      summary: `Invited ${String(rows.length)} singers to ${longDay(day.localDate, scope.locale)}`,
    });
    return rows.length;
  });
}
