import "server-only";
import { and, asc, desc, eq, gt, isNull, ne, sql } from "drizzle-orm";
import { db } from "@/db/client";
import {
  auditionDays,
  callSheetIssues,
  callbackInvitations,
  callbackRounds,
  calls,
  numbers,
  people,
  positions,
  rooms,
} from "@/db/schema";
import type { CallKind } from "@/lib/calls/call-kinds";
import { localDay } from "@/lib/format-dates";
import { can } from "@/lib/permissions/can";
import type { Action } from "@/lib/permissions/can";
import type { Actor, PositionKind } from "@/lib/permissions/types";
import { productionFor } from "../guard";
import type { ProductionScope } from "../guard";
import { countPlaced, countRoles, countSignUps } from "./progress";

/** How far a production is, area by area; null for what is not the actor's to see. */
export type Road = {
  production: ProductionScope;
  mayChange: boolean;
  score: { numbers: number; roles: number } | null;
  auditions: { days: number; nextDay: string | null; signUps: number; placed: number } | null;
  callbacks: { rounds: number; told: number; yes: number; no: number } | null;
  casting: { roles: number; cast: number; published: boolean } | null;
  rehearsals: {
    ahead: number;
    next: { id: string; kind: CallKind; from: Date; zone: string; room: string | null } | null;
  } | null;
  sheets: { issues: number; last: { day: string; number: number } | null } | null;
  people: { kind: PositionKind; count: number }[] | null;
};

const n = sql<number>`count(*)`.mapWith(Number);

/** Throws `not-found` for who may not know of the production, `not-allowed` for who has only their own page in it. */
export async function readRoad(actor: Actor, productionId: string): Promise<Road> {
  const production = await productionFor(actor, productionId, "calls:read");
  const { id, companyId, castPublished, zone } = production;
  const may = (action: Action) =>
    can(actor, action, { companyId, productionId: id, castPublished });
  const when = async <T>(action: Action, read: () => Promise<T>): Promise<T | null> =>
    may(action) ? read() : null;
  const today = localDay(new Date(), zone);
  const [score, auditions, callbacks, casting, rehearsals, sheets, held] = await Promise.all([
    when("score:read", () => readScore(id)),
    when("auditions:read", () => readAuditions(id, today)),
    when("callbacks:read", () => readCallbacks(id)),
    when("casting:see", async () => {
      const counted = (await countRoles([id])).get(id);
      return { roles: counted?.all ?? 0, cast: counted?.cast ?? 0, published: castPublished };
    }),
    when("calls:read", () => readCalls(id, may("calls:change"))),
    when("sheets:read", () => readSheets(id)),
    when("people:read", () => readPeople(id)),
  ]);
  return {
    production,
    mayChange: may("production:change"),
    score,
    auditions,
    callbacks,
    casting,
    rehearsals,
    sheets,
    people: held,
  };
}

async function readScore(id: string): Promise<Road["score"]> {
  const [[counted], rolesOf] = await Promise.all([
    db
      .select({ n })
      .from(numbers)
      .where(and(eq(numbers.productionId, id), isNull(numbers.removedAt))),
    countRoles([id]),
  ]);
  return { numbers: counted?.n ?? 0, roles: rolesOf.get(id)?.all ?? 0 };
}

async function readAuditions(id: string, today: string): Promise<Road["auditions"]> {
  const [days, signUps, placed] = await Promise.all([
    db
      .select({ day: auditionDays.localDate })
      .from(auditionDays)
      .where(and(eq(auditionDays.productionId, id), isNull(auditionDays.removedAt)))
      .orderBy(asc(auditionDays.localDate)),
    countSignUps([id]),
    countPlaced([id]),
  ]);
  return {
    days: days.length,
    nextDay: days.find(({ day }) => day >= today)?.day ?? null,
    signUps: signUps.get(id) ?? 0,
    placed: placed.get(id) ?? 0,
  };
}

async function readCallbacks(id: string): Promise<Road["callbacks"]> {
  const [[rounds], told] = await Promise.all([
    db.select({ n }).from(callbackRounds).where(eq(callbackRounds.productionId, id)),
    db
      .select({ answer: callbackInvitations.answer, n })
      .from(callbackInvitations)
      .innerJoin(callbackRounds, eq(callbackRounds.id, callbackInvitations.roundId))
      .where(and(eq(callbackRounds.productionId, id), isNull(callbackInvitations.supersededAt)))
      .groupBy(callbackInvitations.answer),
  ]);
  const of = (answer: "yes" | "no") => told.find((row) => row.answer === answer)?.n ?? 0;
  return {
    rounds: rounds?.n ?? 0,
    told: told.reduce((sum, row) => sum + row.n, 0),
    yes: of("yes"),
    no: of("no"),
  };
}

async function readCalls(id: string, drafts: boolean): Promise<Road["rehearsals"]> {
  const ahead = and(
    eq(calls.productionId, id),
    drafts ? ne(calls.state, "cancelled") : eq(calls.state, "published"),
    gt(calls.endsAt, new Date()),
  );
  const [[counted], [next]] = await Promise.all([
    db.select({ n }).from(calls).where(ahead),
    db
      .select({
        id: calls.id,
        kind: calls.kind,
        from: calls.startsAt,
        zone: calls.zone,
        room: rooms.name,
      })
      .from(calls)
      .leftJoin(rooms, eq(rooms.id, calls.roomId))
      .where(ahead)
      .orderBy(asc(calls.startsAt))
      .limit(1),
  ]);
  return { ahead: counted?.n ?? 0, next: next ?? null };
}

async function readSheets(id: string): Promise<Road["sheets"]> {
  const ofProduction = eq(callSheetIssues.productionId, id);
  const [[counted], [last]] = await Promise.all([
    db.select({ n }).from(callSheetIssues).where(ofProduction),
    db
      .select({ day: callSheetIssues.localDate, number: callSheetIssues.number })
      .from(callSheetIssues)
      .where(ofProduction)
      .orderBy(desc(callSheetIssues.issuedAt))
      .limit(1),
  ]);
  return { issues: counted?.n ?? 0, last: last ?? null };
}

async function readPeople(id: string): Promise<Road["people"]> {
  return db
    .select({ kind: positions.kind, count: n })
    .from(positions)
    .innerJoin(people, eq(people.id, positions.personId))
    .where(and(eq(positions.productionId, id), isNull(positions.endedAt), isNull(people.removedAt)))
    .groupBy(positions.kind)
    .orderBy(asc(positions.kind));
}
