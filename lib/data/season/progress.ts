import "server-only";
import { and, eq, gt, gte, inArray, isNull, or, sql } from "drizzle-orm";
import { db } from "@/db/client";
import {
  auditionDays,
  auditionRooms,
  callbackInvitations,
  callbackRounds,
  choices,
  pianistSessions,
  roles,
  signUps,
  slotAssignments,
} from "@/db/schema";
import type { SeasonProduction, SeasonProgress } from "./types";

const COMING = ["listed", "invited", "confirmed"] as const;

/** What each production still needs, in counts, as far as the actor may see it. */
export async function readProgress(
  productions: readonly SeasonProduction[],
): Promise<SeasonProgress[]> {
  const who = (sees: keyof SeasonProduction["sees"]) =>
    productions.filter((p) => p.sees[sees]).map((p) => p.id);
  const auditions = who("auditions");
  const [rolesOf, signUpsOf, placedOf, bareOf, unansweredOf] = await Promise.all([
    countRoles(who("casting")),
    countSignUps(auditions),
    countPlaced(auditions),
    countBareRooms(auditions),
    countUnanswered(who("callbacks")),
  ]);
  return productions.map(({ id, sees }) => {
    const all = signUpsOf.get(id) ?? 0;
    return {
      productionId: id,
      roles: sees.casting ? (rolesOf.get(id) ?? { all: 0, cast: 0 }) : null,
      signUps: sees.auditions
        ? {
            all,
            unplaced: all - (placedOf.get(id) ?? 0),
            roomsWithoutPianist: bareOf.get(id) ?? 0,
          }
        : null,
      unanswered: sees.callbacks ? (unansweredOf.get(id) ?? 0) : null,
    };
  });
}

/** Roles, and those that have as many people cast as they need; covers and swings do not count. */
export async function countRoles(
  ids: string[],
): Promise<Map<string, { all: number; cast: number }>> {
  const counted = new Map<string, { all: number; cast: number }>();
  if (ids.length === 0) return counted;
  const rows = await db
    .select({
      productionId: roles.productionId,
      needed: roles.needed,
      cast: sql<number>`count(${choices.id})`.mapWith(Number),
    })
    .from(roles)
    .leftJoin(
      choices,
      and(
        eq(choices.roleId, roles.id),
        eq(choices.state, "cast"),
        inArray(choices.kind, ["principal", "alternate"]),
      ),
    )
    .where(and(inArray(roles.productionId, ids), isNull(roles.removedAt)))
    .groupBy(roles.id, roles.productionId, roles.needed);
  for (const row of rows) {
    const sum = counted.get(row.productionId) ?? { all: 0, cast: 0 };
    sum.all += 1;
    if (row.cast >= row.needed) sum.cast += 1;
    counted.set(row.productionId, sum);
  }
  return counted;
}

type Counts = Promise<Map<string, number>>;
const asMap = async (rows: PromiseLike<{ productionId: string; n: number }[]>): Counts =>
  new Map((await rows).map((row) => [row.productionId, row.n]));
const n = sql<number>`count(*)`.mapWith(Number);

export async function countSignUps(ids: string[]): Counts {
  if (ids.length === 0) return new Map();
  return asMap(
    db
      .select({ productionId: signUps.productionId, n })
      .from(signUps)
      .where(and(inArray(signUps.productionId, ids), inArray(signUps.state, COMING)))
      .groupBy(signUps.productionId),
  );
}

export async function countPlaced(ids: string[]): Counts {
  if (ids.length === 0) return new Map();
  return asMap(
    db
      .select({
        productionId: signUps.productionId,
        n: sql<number>`count(distinct ${signUps.id})`.mapWith(Number),
      })
      .from(slotAssignments)
      .innerJoin(signUps, eq(signUps.id, slotAssignments.signUpId))
      .innerJoin(auditionDays, eq(auditionDays.id, slotAssignments.dayId))
      .where(
        and(
          inArray(signUps.productionId, ids),
          inArray(signUps.state, COMING),
          isNull(auditionDays.removedAt),
        ),
      )
      .groupBy(signUps.productionId),
  );
}

/** Audition rooms still to come in which nobody plays. */
async function countBareRooms(ids: string[]): Counts {
  if (ids.length === 0) return new Map();
  return asMap(
    db
      .select({ productionId: auditionDays.productionId, n })
      .from(auditionRooms)
      .innerJoin(auditionDays, eq(auditionDays.id, auditionRooms.dayId))
      .leftJoin(pianistSessions, eq(pianistSessions.auditionRoomId, auditionRooms.id))
      .where(
        and(
          inArray(auditionDays.productionId, ids),
          isNull(auditionDays.removedAt),
          isNull(pianistSessions.id),
          gte(auditionRooms.closesAt, new Date()),
        ),
      )
      .groupBy(auditionDays.productionId),
  );
}

/** Callbacks that went out, are not over, and have no answer. */
async function countUnanswered(ids: string[]): Counts {
  if (ids.length === 0) return new Map();
  return asMap(
    db
      .select({ productionId: callbackRounds.productionId, n })
      .from(callbackInvitations)
      .innerJoin(callbackRounds, eq(callbackRounds.id, callbackInvitations.roundId))
      .where(
        and(
          inArray(callbackRounds.productionId, ids),
          isNull(callbackInvitations.supersededAt),
          isNull(callbackInvitations.answer),
          or(isNull(callbackRounds.endsAt), gt(callbackRounds.endsAt, new Date())),
        ),
      )
      .groupBy(callbackRounds.productionId),
  );
}
