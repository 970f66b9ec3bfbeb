import "server-only";
import { and, eq, gt, inArray, isNotNull, isNull, lt, ne, notInArray, or } from "drizzle-orm";
import { db } from "@/db/client";
import {
  auditionDays,
  auditionRooms,
  blocks,
  callbackInvitations,
  callbackRounds,
  called,
  calls,
  people,
  pianistSessions,
  productions,
  signUps,
  slotAssignments,
  slots,
} from "@/db/schema";
import type { Interval } from "@/lib/schedule/types";
import { calledStretches } from "./called-stretches";
import type { SeasonEventKind } from "./types";

/** One login's time in a production outside the ones that are looked at. What it is for is only for that person. */
type Elsewhere = Interval & {
  login: string;
  kind: SeasonEventKind;
  production: string;
  zone: string;
};

/**
 * When these logins are engaged in productions other than those given, in any company: published calls they are called
 * to, lead or play for, audition rooms they play in, auditions and callbacks they sing in. Asks no permission: whoever
 * calls this shows nobody more than "engaged, from, to" of somebody else.
 */
export async function readElsewhere(
  logins: readonly string[],
  seen: readonly string[],
  window: Interval,
): Promise<Elsewhere[]> {
  if (logins.length === 0) return [];
  const records = await db
    .select({ id: people.id, login: people.userId })
    .from(people)
    .where(and(inArray(people.userId, [...logins]), isNull(people.removedAt)));
  const loginOf = new Map(
    records.flatMap(({ id, login }) => (login === null ? [] : [[id, login]])),
  );
  const ids = [...loginOf.keys()];
  if (ids.length === 0) return [];
  const found = await Promise.all([
    inCalls(ids, seen, window),
    inAuditions(ids, seen, window),
    inCallbacks(ids, seen, window),
  ]);
  return found.flat().flatMap(({ personId, ...rest }) => {
    const login = loginOf.get(personId);
    return login === undefined ? [] : [{ ...rest, login }];
  });
}

type Row = Omit<Elsewhere, "login"> & { personId: string };

const elsewhere = (seen: readonly string[]) =>
  and(
    seen.length > 0 ? notInArray(productions.id, [...seen]) : undefined,
    isNull(productions.removedAt),
  );

async function inCalls(ids: string[], seen: readonly string[], window: Interval): Promise<Row[]> {
  const rows = await db
    .select({
      id: calls.id,
      kind: calls.kind,
      production: productions.title,
      zone: calls.zone,
      from: calls.startsAt,
      to: calls.endsAt,
      leaderId: calls.leaderId,
      pianistId: calls.pianistId,
    })
    .from(calls)
    .innerJoin(productions, eq(productions.id, calls.productionId))
    .where(
      and(
        elsewhere(seen),
        eq(calls.state, "published"),
        lt(calls.startsAt, window.to),
        gt(calls.endsAt, window.from),
        or(
          inArray(calls.leaderId, ids),
          inArray(calls.pianistId, ids),
          inArray(
            calls.id,
            db
              .select({ id: blocks.callId })
              .from(called)
              .innerJoin(blocks, eq(blocks.id, called.blockId))
              .where(inArray(called.personId, ids)),
          ),
        ),
      ),
    );
  const wanted = new Set(ids);
  const byId = new Map(rows.map((row) => [row.id, row]));
  const throughout = rows.flatMap(({ id: _, leaderId, pianistId, ...row }) =>
    [...new Set([leaderId, pianistId])].flatMap((personId) =>
      personId !== null && wanted.has(personId) ? [{ ...row, personId }] : [],
    ),
  );
  const stretches = (await calledStretches(rows)).flatMap(({ callId, personId, from, to }) => {
    const call = byId.get(callId);
    if (!call || !wanted.has(personId)) return [];
    if (call.leaderId === personId || call.pianistId === personId) return [];
    return [{ personId, from, to, kind: call.kind, production: call.production, zone: call.zone }];
  });
  return [...throughout, ...stretches];
}

async function inAuditions(ids: string[], seen: readonly string[], window: Interval) {
  const day = { production: productions.title, zone: auditionDays.zone };
  const [playing, singing] = await Promise.all([
    db
      .select({
        ...day,
        personId: pianistSessions.personId,
        from: pianistSessions.startsAt,
        to: pianistSessions.endsAt,
      })
      .from(pianistSessions)
      .innerJoin(auditionRooms, eq(auditionRooms.id, pianistSessions.auditionRoomId))
      .innerJoin(auditionDays, eq(auditionDays.id, auditionRooms.dayId))
      .innerJoin(productions, eq(productions.id, auditionDays.productionId))
      .where(
        and(
          elsewhere(seen),
          inArray(pianistSessions.personId, ids),
          isNull(auditionDays.removedAt),
          lt(pianistSessions.startsAt, window.to),
          gt(pianistSessions.endsAt, window.from),
        ),
      ),
    db
      .select({ ...day, personId: signUps.personId, from: slots.startsAt, to: slots.endsAt })
      .from(slotAssignments)
      .innerJoin(signUps, eq(signUps.id, slotAssignments.signUpId))
      .innerJoin(slots, eq(slots.id, slotAssignments.slotId))
      .innerJoin(auditionDays, eq(auditionDays.id, slotAssignments.dayId))
      .innerJoin(productions, eq(productions.id, auditionDays.productionId))
      .where(
        and(
          elsewhere(seen),
          inArray(signUps.personId, ids),
          inArray(signUps.state, ["invited", "confirmed"]),
          isNull(auditionDays.removedAt),
          lt(slots.startsAt, window.to),
          gt(slots.endsAt, window.from),
        ),
      ),
  ]);
  return [...playing, ...singing].map((row) => ({ ...row, kind: "audition" as const }));
}

async function inCallbacks(ids: string[], seen: readonly string[], window: Interval) {
  const rows = await db
    .select({
      personId: callbackInvitations.personId,
      production: productions.title,
      zone: callbackRounds.zone,
      from: callbackRounds.startsAt,
      to: callbackRounds.endsAt,
    })
    .from(callbackInvitations)
    .innerJoin(callbackRounds, eq(callbackRounds.id, callbackInvitations.roundId))
    .innerJoin(productions, eq(productions.id, callbackRounds.productionId))
    .where(
      and(
        elsewhere(seen),
        inArray(callbackInvitations.personId, ids),
        isNull(callbackInvitations.supersededAt),
        or(isNull(callbackInvitations.answer), ne(callbackInvitations.answer, "no")),
        isNotNull(callbackRounds.startsAt),
        isNotNull(callbackRounds.endsAt),
        lt(callbackRounds.startsAt, window.to),
        gt(callbackRounds.endsAt, window.from),
      ),
    );
  return rows.flatMap(({ from, to, ...row }) =>
    from && to ? [{ ...row, from, to, kind: "callback" as const }] : [],
  );
}
