import "server-only";
import { and, eq, gt, inArray, isNotNull, isNull, lt, ne, or } from "drizzle-orm";
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
  rooms,
  signUps,
  slotAssignments,
  slots,
} from "@/db/schema";
import { CALL_PHRASES } from "@/lib/calls/call-kinds";
import type { Engagement } from "@/lib/calls/types";
import type { ProductionScope } from "@/lib/data/guard";
import { groupBy } from "@/lib/group-by";
import type { Interval } from "@/lib/schedule/types";
import { hearingElsewhere } from "./hearing";

type Who = {
  people: Map<string, string>;
  companyId: string;
  productionId: string;
  /** The reader may not see who is cast. */
  castHidden: boolean;
};

/**
 * What these people do elsewhere in a time, in every company that has a record of them: calls they are called to, lead or
 * play for, audition rooms they play in, auditions and callbacks they sing in, and those they hear as music directors. Of their own production drafts count
 * too, but with `castHidden` not whom the score calls in them. What another company does is no more than "is engaged"; so is
 * singing for another production.
 */
export async function readEngagements(
  scope: ProductionScope,
  keys: Map<string, string>,
  window: Interval,
  castHidden: boolean,
): Promise<Engagement[]> {
  const ids = await recordsOf(keys);
  if (ids.size === 0) return [];
  const who: Who = {
    people: ids,
    companyId: scope.companyId,
    productionId: scope.id,
    castHidden,
  };
  const found = await Promise.all([
    calledElsewhere(who, window),
    leadingElsewhere(who, window),
    playingElsewhere(who, window),
    singingElsewhere(who, window),
    hearingElsewhere(ids, scope, window),
  ]);
  return found.flat().map((engagement, index) => ({ ...engagement, id: `e${index}` }));
}

/** Every company's records of the same logins, each with the login. */
async function recordsOf(keys: Map<string, string>): Promise<Map<string, string>> {
  const all = new Map(keys);
  const logins = [...new Set(keys.values())];
  if (logins.length === 0) return all;
  const rows = await db
    .select({ id: people.id, userId: people.userId })
    .from(people)
    .where(inArray(people.userId, logins));
  for (const row of rows) if (row.userId !== null) all.set(row.id, row.userId);
  return all;
}

type Unnumbered = Omit<Engagement, "id">;
type CallRow = {
  callId: string;
  productionId: string;
  companyId: string;
  production: string;
  kind: keyof typeof CALL_PHRASES;
  state: string;
};

const callColumns = {
  callId: calls.id,
  productionId: calls.productionId,
  companyId: productions.companyId,
  production: productions.title,
  kind: calls.kind,
  state: calls.state,
  venueId: rooms.venueId,
};

function callLabel(who: Who, verb: string, call: CallRow): string {
  if (call.companyId !== who.companyId) return "is engaged";
  const what = `${verb} ${CALL_PHRASES[call.kind]}`;
  if (call.productionId !== who.productionId) return `${what} of ${call.production}`;
  return `${what} of this production${call.state === "draft" ? " (a draft)" : ""}`;
}

/** Drafts are nobody else's business; the other productions' calls count once they are published. */
const counts = (who: Who, window: Interval) =>
  and(
    or(
      eq(calls.state, "published"),
      and(eq(calls.state, "draft"), eq(calls.productionId, who.productionId)),
    ),
    isNull(productions.removedAt),
    lt(calls.startsAt, window.to),
    gt(calls.endsAt, window.from),
  );

async function calledElsewhere(who: Who, window: Interval): Promise<Unnumbered[]> {
  const rows = await db
    .select({
      ...callColumns,
      personId: called.personId,
      blockId: called.blockId,
      startsAt: calls.startsAt,
    })
    .from(called)
    .innerJoin(blocks, eq(blocks.id, called.blockId))
    .innerJoin(calls, eq(calls.id, blocks.callId))
    .innerJoin(productions, eq(productions.id, calls.productionId))
    .leftJoin(rooms, eq(rooms.id, calls.roomId))
    .where(
      and(
        inArray(called.personId, [...who.people.keys()]),
        eq(called.excused, false),
        counts(who, window),
        who.castHidden ? or(eq(calls.state, "published"), eq(called.source, "hand")) : undefined,
      ),
    );
  const times = await timesOfBlocks([...new Set(rows.map((row) => row.callId))]);
  const engaged: Unnumbered[] = [];
  for (const theirs of groupBy(rows, (row) => `${row.personId} ${row.callId}`).values()) {
    const stretches = theirs
      .flatMap((row) => times.get(row.blockId) ?? [])
      .sort((a, b) => a.from.getTime() - b.from.getTime());
    const [row] = theirs;
    if (!row) continue;
    for (const stretch of joined(stretches)) {
      engaged.push({
        ...stretch,
        who: who.people.get(row.personId) ?? row.personId,
        plays: false,
        callId: row.callId,
        label: callLabel(who, "is called to", row),
        venueId: row.venueId,
      });
    }
  }
  return engaged;
}

function joined(stretches: Interval[]): Interval[] {
  const runs: Interval[] = [];
  for (const stretch of stretches) {
    const last = runs.at(-1);
    if (last && last.to.getTime() === stretch.from.getTime()) last.to = stretch.to;
    else runs.push({ ...stretch });
  }
  return runs;
}

/** When each block of these calls is: back to back from the start of its call. */
async function timesOfBlocks(callIds: string[]): Promise<Map<string, Interval>> {
  const times = new Map<string, Interval>();
  if (callIds.length === 0) return times;
  const rows = await db
    .select({
      id: blocks.id,
      callId: blocks.callId,
      minutes: blocks.minutes,
      startsAt: calls.startsAt,
    })
    .from(blocks)
    .innerJoin(calls, eq(calls.id, blocks.callId))
    .where(inArray(blocks.callId, callIds))
    .orderBy(blocks.callId, blocks.place);
  for (const ofCall of groupBy(rows, (row) => row.callId).values()) {
    let at = ofCall[0]?.startsAt.getTime() ?? 0;
    for (const block of ofCall) {
      const to = at + block.minutes * 60_000;
      times.set(block.id, { from: new Date(at), to: new Date(to) });
      at = to;
    }
  }
  return times;
}

async function leadingElsewhere(who: Who, window: Interval): Promise<Unnumbered[]> {
  const rows = await db
    .select({ ...callColumns, personId: calls.leaderId, from: calls.startsAt, to: calls.endsAt })
    .from(calls)
    .innerJoin(productions, eq(productions.id, calls.productionId))
    .leftJoin(rooms, eq(rooms.id, calls.roomId))
    .where(and(inArray(calls.leaderId, [...who.people.keys()]), counts(who, window)));
  return rows.map((row) => ({
    from: row.from,
    to: row.to,
    who: who.people.get(row.personId ?? "") ?? "",
    plays: false,
    callId: row.callId,
    label: callLabel(who, "leads", row),
    venueId: row.venueId,
  }));
}

async function playingElsewhere(who: Who, window: Interval): Promise<Unnumbered[]> {
  const [inCalls, inRooms] = await Promise.all([
    // A draft of the same production already counts on its pianist; published calls hold theirs.
    db
      .select({ ...callColumns, personId: calls.pianistId, from: calls.startsAt, to: calls.endsAt })
      .from(calls)
      .innerJoin(productions, eq(productions.id, calls.productionId))
      .leftJoin(rooms, eq(rooms.id, calls.roomId))
      .where(and(inArray(calls.pianistId, [...who.people.keys()]), counts(who, window))),
    db
      .select({
        personId: pianistSessions.personId,
        from: pianistSessions.startsAt,
        to: pianistSessions.endsAt,
        companyId: productions.companyId,
        productionId: productions.id,
        production: productions.title,
        venueId: rooms.venueId,
      })
      .from(pianistSessions)
      .innerJoin(productions, eq(productions.id, pianistSessions.productionId))
      .innerJoin(auditionRooms, eq(auditionRooms.id, pianistSessions.auditionRoomId))
      .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
      .where(
        and(
          inArray(pianistSessions.bookeeId, [...new Set(who.people.values())]),
          lt(pianistSessions.startsAt, window.to),
          gt(pianistSessions.endsAt, window.from),
        ),
      ),
  ]);
  return [
    ...inCalls.map((row) => ({
      from: row.from,
      to: row.to,
      who: who.people.get(row.personId ?? "") ?? "",
      plays: true,
      callId: row.callId,
      label: callLabel(who, "plays for", row),
      venueId: row.venueId,
    })),
    ...inRooms.map((row) => ({
      from: row.from,
      to: row.to,
      who: who.people.get(row.personId) ?? row.personId,
      plays: true,
      callId: null,
      label:
        row.companyId === who.companyId
          ? `plays for the auditions of ${row.production}`
          : "is engaged",
      venueId: row.venueId,
    })),
  ];
}

async function singingElsewhere(who: Who, window: Interval): Promise<Unnumbered[]> {
  const ids = [...who.people.keys()];
  const [auditions, callbacks] = await Promise.all([
    db
      .select({
        personId: signUps.personId,
        productionId: signUps.productionId,
        from: slots.startsAt,
        to: slots.endsAt,
        venueId: rooms.venueId,
      })
      .from(slotAssignments)
      .innerJoin(signUps, eq(signUps.id, slotAssignments.signUpId))
      .innerJoin(slots, eq(slots.id, slotAssignments.slotId))
      .innerJoin(auditionRooms, eq(auditionRooms.id, slots.auditionRoomId))
      .innerJoin(auditionDays, eq(auditionDays.id, auditionRooms.dayId))
      .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
      .where(
        and(
          inArray(signUps.personId, ids),
          inArray(signUps.state, ["invited", "confirmed"]),
          isNull(auditionDays.removedAt),
          lt(slots.startsAt, window.to),
          gt(slots.endsAt, window.from),
        ),
      ),
    db
      .select({
        personId: callbackInvitations.personId,
        productionId: callbackRounds.productionId,
        from: callbackRounds.startsAt,
        to: callbackRounds.endsAt,
        venueId: rooms.venueId,
      })
      .from(callbackInvitations)
      .innerJoin(callbackRounds, eq(callbackRounds.id, callbackInvitations.roundId))
      .leftJoin(rooms, eq(rooms.id, callbackRounds.roomId))
      .where(
        and(
          inArray(callbackInvitations.personId, ids),
          isNull(callbackInvitations.supersededAt),
          or(isNull(callbackInvitations.answer), ne(callbackInvitations.answer, "no")),
          isNotNull(callbackRounds.startsAt),
          isNotNull(callbackRounds.endsAt),
          lt(callbackRounds.startsAt, window.to),
          gt(callbackRounds.endsAt, window.from),
        ),
      ),
  ]);
  const engaged = (rows: typeof callbacks, what: string): Unnumbered[] =>
    rows.flatMap((row) =>
      row.from === null || row.to === null
        ? []
        : [
            {
              from: row.from,
              to: row.to,
              who: who.people.get(row.personId) ?? row.personId,
              plays: false,
              callId: null,
              // Where somebody else is heard is theirs to tell, even within one company.
              label:
                row.productionId === who.productionId
                  ? `is at the ${what} of this production`
                  : "is engaged",
              venueId: row.venueId,
            },
          ],
    );
  return [...engaged(auditions, "auditions"), ...engaged(callbacks, "callbacks")];
}
