import "server-only";
import { aliasedTable, and, asc, eq, inArray } from "drizzle-orm";
import { db } from "@/db/client";
import { blocks, called, calls, numbers, people, rooms, venues } from "@/db/schema";
import { BLOCK_KIND_NAMES } from "@/lib/calls/call-kinds";
import type { CallPlan, CalledPerson } from "@/lib/calls/types";
import { groupBy } from "@/lib/group-by";
import { blockTimes } from "@/lib/schedule/block-times";
import { whoIsNeeded } from "@/lib/schedule/who-is-needed";
import type { CallDraft } from "@/lib/schemas/calls";
import type { ScoreAndCast } from "./needed";

export type SavedCall = {
  id: string;
  productionId: string;
  kind: (typeof calls.$inferSelect)["kind"];
  title: string | null;
  state: (typeof calls.$inferSelect)["state"];
  version: number;
  localDate: string;
  localTime: string;
  zone: string;
  startsAt: Date;
  endsAt: Date;
  roomId: string | null;
  room: string | null;
  venue: string | null;
  address: string | null;
  leaderId: string | null;
  leader: string | null;
  pianistId: string | null;
  pianist: string | null;
};

const leaders = aliasedTable(people, "leaders");
const players = aliasedTable(people, "players");

/** Calls of one production with their places and names, in order of start. Asks no permission: the caller has. */
export async function savedCalls(
  productionId: string,
  where?: ReturnType<typeof and>,
): Promise<SavedCall[]> {
  return db
    .select({
      id: calls.id,
      productionId: calls.productionId,
      kind: calls.kind,
      title: calls.title,
      state: calls.state,
      version: calls.version,
      localDate: calls.localDate,
      localTime: calls.localTime,
      zone: calls.zone,
      startsAt: calls.startsAt,
      endsAt: calls.endsAt,
      roomId: calls.roomId,
      room: rooms.name,
      venue: venues.name,
      address: venues.address,
      leaderId: calls.leaderId,
      leader: leaders.name,
      pianistId: calls.pianistId,
      pianist: players.name,
    })
    .from(calls)
    .leftJoin(rooms, eq(rooms.id, calls.roomId))
    .leftJoin(venues, eq(venues.id, rooms.venueId))
    .leftJoin(leaders, eq(leaders.id, calls.leaderId))
    .leftJoin(players, eq(players.id, calls.pianistId))
    .where(and(eq(calls.productionId, productionId), where))
    .orderBy(asc(calls.startsAt), asc(calls.id));
}

/** Names of everyone in these plans' blocks, beside the plans. */
export type SavedPlans = { plans: Map<string, CallPlan>; names: Map<string, string> };

/** The blocks of saved calls with their times and who is called, as they were saved. */
export async function savedPlans(
  score: ScoreAndCast,
  saved: readonly SavedCall[],
): Promise<SavedPlans> {
  const names = new Map<string, string>();
  if (saved.length === 0) return { plans: new Map(), names };
  const [blockRows, calledRows] = await Promise.all([
    db
      .select({
        id: blocks.id,
        callId: blocks.callId,
        kind: blocks.kind,
        minutes: blocks.minutes,
        numberId: blocks.numberId,
        blockTitle: blocks.title,
        bars: blocks.bars,
        detail: blocks.detail,
        label: numbers.label,
        title: numbers.title,
      })
      .from(blocks)
      .leftJoin(numbers, eq(numbers.id, blocks.numberId))
      .where(
        inArray(
          blocks.callId,
          saved.map((call) => call.id),
        ),
      )
      .orderBy(asc(blocks.callId), asc(blocks.place)),
    db
      .select({
        blockId: called.blockId,
        personId: called.personId,
        name: people.name,
        source: called.source,
        reason: called.reason,
        excused: called.excused,
      })
      .from(called)
      .innerJoin(blocks, eq(blocks.id, called.blockId))
      .innerJoin(people, eq(people.id, called.personId))
      .where(
        inArray(
          blocks.callId,
          saved.map((call) => call.id),
        ),
      ),
  ]);
  for (const row of calledRows) names.set(row.personId, row.name);
  const needs = whoIsNeeded({ blocks: blockRows, lines: score.lines, cast: score.cast });
  const needOf = new Map(needs.map((need) => [need.blockId, need]));
  const calledOf = groupBy(calledRows, (row) => row.blockId);
  const castPlace = placesOf(score);
  const blocksOf = groupBy(blockRows, (row) => row.callId);
  const roleName = (roleId: string): string => score.roleNames.get(roleId) ?? "";
  const plans = new Map<string, CallPlan>();
  for (const call of saved) {
    const timed = blockTimes(call.startsAt, blocksOf.get(call.id) ?? []);
    plans.set(call.id, {
      callId: call.id,
      zone: call.zone,
      from: call.startsAt,
      to: call.endsAt,
      roomId: call.roomId,
      leaderId: call.leaderId,
      pianistId: call.pianistId,
      blocks: timed.map((block) => ({
        key: block.id,
        kind: block.kind,
        minutes: block.minutes,
        numberId: block.numberId,
        label: block.label,
        title: block.title ?? block.blockTitle ?? BLOCK_KIND_NAMES[block.kind],
        bars: block.bars,
        detail: block.detail,
        from: block.from,
        to: block.to,
        called: (calledOf.get(block.id) ?? [])
          .map((row): CalledPerson => {
            const need = needOf
              .get(block.id)
              ?.people.find(({ personId }) => personId === row.personId);
            return {
              personId: row.personId,
              roleNames: (need?.roleIds ?? []).map(roleName),
              source: row.source,
              reason: row.reason,
              excused: row.excused,
            };
          })
          .sort((a, b) => castPlace(a.personId) - castPlace(b.personId) || byName(names, a, b)),
        uncastRoles: (needOf.get(block.id)?.uncastRoleIds ?? []).map(roleName),
      })),
    });
  }
  return { plans, names };
}

function placesOf(score: ScoreAndCast): (personId: string) => number {
  const places = new Map<string, number>();
  for (const { personId } of [...score.cast, ...score.covers]) {
    if (!places.has(personId)) places.set(personId, places.size);
  }
  return (personId) => places.get(personId) ?? places.size;
}

function byName(names: Map<string, string>, a: CalledPerson, b: CalledPerson): number {
  return (names.get(a.personId) ?? "").localeCompare(names.get(b.personId) ?? "");
}

/** A saved call as its form has it, so that it can be changed, or made again from the casting of today. */
export function draftOf(saved: SavedCall, plan: CallPlan): CallDraft {
  return {
    productionId: saved.productionId,
    kind: saved.kind,
    title: saved.title,
    localDate: saved.localDate,
    localTime: saved.localTime,
    roomId: saved.roomId,
    leaderId: saved.leaderId,
    pianistId: saved.pianistId,
    blocks: plan.blocks.map((block) => ({
      key: block.key,
      kind: block.kind,
      minutes: block.minutes,
      numberId: block.numberId,
      title:
        block.kind === "number" || block.title === BLOCK_KIND_NAMES[block.kind]
          ? null
          : block.title,
      bars: block.bars,
      detail: block.detail,
    })),
    hand: handOf(plan),
  };
}

/** The changes by hand, each person's with the same reason as one, over the blocks it is about. */
export function handOf(plan: CallPlan): CallDraft["hand"] {
  const changes = new Map<string, CallDraft["hand"][number]>();
  for (const block of plan.blocks) {
    for (const person of block.called) {
      if (person.source === "score" && !person.excused) continue;
      const act = person.excused ? "excuse" : "call";
      const reason = person.reason ?? "";
      const name = `${act} ${person.personId} ${reason}`;
      const change = changes.get(name) ?? { personId: person.personId, act, reason, keys: [] };
      change.keys.push(block.key);
      changes.set(name, change);
    }
  }
  return [...changes.values()];
}
