import "server-only";
import { and, eq, inArray, isNull, sql } from "drizzle-orm";
import type { z } from "zod";
import type { Tx } from "@/db/client";
import { newId } from "@/db/columns";
import { callbackInvitations, callbackRounds, people, positions, roomBookings } from "@/db/schema";
import type { CallbackSnapshot } from "@/db/schema/callbacks";
import { recordAudit } from "@/lib/data/audit";
import { productionFor } from "@/lib/data/guard";
import type { ProductionScope } from "@/lib/data/guard";
import { makeInvitationLink } from "@/lib/data/invitations";
import { queueMail } from "@/lib/data/outbox";
import { duplicateKey, inTransaction } from "@/lib/data/transaction";
import { env } from "@/lib/env";
import { AppError } from "@/lib/errors";
import { clockSpan, localDay, longDay } from "@/lib/format-dates";
import type { Actor } from "@/lib/permissions/types";
import type { publishRoundSchema } from "@/lib/schemas/callbacks";
import { latestRound } from "./round";
import type { Round } from "./round";
import { compareWithSent, countChanges, standingInvitations, wantedSnapshots } from "./standing";
import type { PublishedCount } from "./standing";

/**
 * Publishes the list: each person marked gets what concerns them and nothing else, as a snapshot that is never altered.
 * People whose snapshot is the same as before are not told again; people taken off see it no longer. Takes the room.
 * Throws `stale`, `refused` (no time or nobody marked) or `taken` (the room).
 */
export async function publishRound(
  actor: Actor,
  input: z.output<typeof publishRoundSchema>,
): Promise<PublishedCount> {
  const scope = await productionFor(actor, input.productionId, "callbacks:publish");
  const round = await latestRound(scope.id);
  if (round?.id !== input.roundId) throw new AppError("not-found");
  const { startsAt, endsAt } = round;
  if (!startsAt || !endsAt)
    throw new AppError("refused", "Say when the callbacks are before the list goes out.");
  try {
    return await inTransaction(async (tx) => {
      const [locked] = await tx
        .update(callbackRounds)
        .set({
          issue: sql`${callbackRounds.issue} + 1`,
          publishedAt: new Date(),
          version: sql`${callbackRounds.version} + 1`,
        })
        .where(and(eq(callbackRounds.id, round.id), eq(callbackRounds.version, input.version)));
      if (locked.affectedRows === 0) throw new AppError("stale");
      const wanted = await wantedSnapshots(tx, scope.id, round);
      if (wanted.size === 0)
        throw new AppError(
          "refused",
          "Nobody is marked yet. Mark who is called back, then publish.",
        );
      await holdRoom(tx, round, startsAt, endsAt);
      const counts = await writeInvitations(tx, actor, scope, round, wanted);
      await recordAudit(tx, actor, {
        companyId: scope.companyId,
        productionId: scope.id,
        action: "callbacks.publish",
        subjectKind: "round",
        subjectId: round.id,
        summary: `Published ${round.title}: ${String(counts.told)} told, ${String(counts.takenOff)} taken off`,
      });
      return counts;
    });
  } catch (error) {
    if (duplicateKey(error) === "room_bookings_held") {
      throw new AppError(
        "taken",
        `${round.room ?? "The room"} is taken then. Choose another room or time.`,
      );
    }
    throw error;
  }
}

async function holdRoom(tx: Tx, round: Round, startsAt: Date, endsAt: Date): Promise<void> {
  await tx.delete(roomBookings).where(eq(roomBookings.callbackRoundId, round.id));
  if (round.roomId)
    await tx
      .insert(roomBookings)
      .values({ roomId: round.roomId, startsAt, endsAt, callbackRoundId: round.id });
}

async function writeInvitations(
  tx: Tx,
  actor: Actor,
  scope: ProductionScope,
  round: Round,
  wanted: Map<string, CallbackSnapshot>,
): Promise<PublishedCount> {
  const standing = await standingInvitations(tx, round.id, true);
  const changes = compareWithSent(wanted, standing);
  const over = standing.filter((row) => changes.get(row.personId) !== "none");
  if (over.length > 0) {
    await tx
      .update(callbackInvitations)
      .set({ supersededAt: new Date() })
      .where(
        inArray(
          callbackInvitations.id,
          over.map((row) => row.id),
        ),
      );
  }
  const fresh = [...wanted].filter(([personId]) => changes.get(personId) !== "none");
  const issue = round.issue + 1;
  for (const [personId, snapshot] of fresh) {
    const id = newId();
    await tx
      .insert(callbackInvitations)
      .values({ id, roundId: round.id, personId, issue, snapshot, publishedAt: new Date() });
    await mailCallback(tx, actor, scope, { id, personId, snapshot });
  }
  return countChanges(changes);
}

async function mailCallback(
  tx: Tx,
  actor: Actor,
  scope: ProductionScope,
  invitation: { id: string; personId: string; snapshot: CallbackSnapshot },
): Promise<void> {
  const [person] = await tx
    .select({
      name: people.name,
      email: people.email,
      userId: people.userId,
      positionId: positions.id,
    })
    .from(people)
    .innerJoin(
      positions,
      and(
        eq(positions.personId, people.id),
        eq(positions.productionId, scope.id),
        eq(positions.kind, "actor"),
        isNull(positions.endedAt),
      ),
    )
    .where(eq(people.id, invitation.personId));
  if (!person?.email) return;
  const { startsAt, endsAt, zone, room } = invitation.snapshot;
  const from = new Date(startsAt ?? 0);
  const link =
    person.userId === null
      ? await makeInvitationLink(tx, actor, {
          positionId: person.positionId,
          email: person.email,
          to: "/me",
        })
      : new URL("/me", env().AUTH_URL).toString();
  await queueMail(tx, {
    companyId: scope.companyId,
    to: person.email,
    template: "callback",
    data: {
      name: person.name,
      production: scope.title,
      roles: invitation.snapshot.roles.join(", "),
      when: `${longDay(localDay(from, zone), scope.locale)}, ${clockSpan(from, new Date(endsAt ?? 0), zone)}`,
      where: room ?? "place to follow",
      link,
    },
    dedupeKey: `callback:${invitation.id}`,
  });
}
