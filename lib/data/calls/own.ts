import "server-only";
import { and, asc, eq, gt, inArray, isNull, or } from "drizzle-orm";
import { db } from "@/db/client";
import { blocks, called, calls, companies, numbers, productions, rooms, venues } from "@/db/schema";
import { BLOCK_KIND_NAMES } from "@/lib/calls/call-kinds";
import type { CallKind } from "@/lib/calls/call-kinds";
import { groupBy } from "@/lib/group-by";
import type { Actor } from "@/lib/permissions/types";
import { blockTimes } from "@/lib/schedule/block-times";

export type OwnBlock = {
  id: string;
  from: Date;
  to: Date;
  label: string | null;
  title: string;
  bars: string | null;
  detail: string | null;
};

export type OwnCall = {
  callId: string;
  productionId: string;
  production: string;
  company: string;
  kind: CallKind;
  title: string | null;
  localDate: string;
  zone: string;
  /** When the person has to be there, and when they may go: theirs, not the call's. */
  from: Date;
  releasedAt: Date;
  room: string | null;
  venue: string | null;
  address: string | null;
  /** Leads or plays: there for the whole call. */
  whole: boolean;
  blocks: OwnBlock[];
};

/**
 * The published calls the actor is called to, leads or plays for, in every production where they hold a position, from
 * `after` (now unless told) on, in order. Only their own blocks; nobody else is named.
 */
export async function listOwnCalls(
  actor: Actor,
  { after = new Date() }: { after?: Date } = {},
): Promise<OwnCall[]> {
  const held = actor.positions.filter((position) => position.productionId !== null);
  const productionIds = [...new Set(held.flatMap((position) => position.productionId ?? []))];
  const mine = [...new Set(held.map((position) => position.personId))];
  if (productionIds.length === 0 || mine.length === 0) return [];
  const calledBlocks = db
    .select({ callId: blocks.callId })
    .from(called)
    .innerJoin(blocks, eq(blocks.id, called.blockId))
    .where(and(inArray(called.personId, mine), eq(called.excused, false)));
  const rows = await db
    .select({
      callId: calls.id,
      productionId: productions.id,
      production: productions.title,
      company: companies.name,
      kind: calls.kind,
      title: calls.title,
      localDate: calls.localDate,
      zone: calls.zone,
      startsAt: calls.startsAt,
      endsAt: calls.endsAt,
      leaderId: calls.leaderId,
      pianistId: calls.pianistId,
      room: rooms.name,
      venue: venues.name,
      address: venues.address,
    })
    .from(calls)
    .innerJoin(
      productions,
      and(eq(productions.id, calls.productionId), isNull(productions.removedAt)),
    )
    .innerJoin(companies, eq(companies.id, productions.companyId))
    .leftJoin(rooms, eq(rooms.id, calls.roomId))
    .leftJoin(venues, eq(venues.id, rooms.venueId))
    .where(
      and(
        inArray(calls.productionId, productionIds),
        eq(calls.state, "published"),
        gt(calls.endsAt, after),
        or(
          inArray(calls.leaderId, mine),
          inArray(calls.pianistId, mine),
          inArray(calls.id, calledBlocks),
        ),
      ),
    )
    .orderBy(asc(calls.startsAt), asc(calls.id));
  const own = await ownBlocks(
    rows.map((row) => row.callId),
    mine,
  );
  return rows.flatMap(({ startsAt, endsAt, leaderId, pianistId, ...row }) => {
    const whole = [leaderId, pianistId].some((id) => id !== null && mine.includes(id));
    const timed = blockTimes(startsAt, own.get(row.callId) ?? []);
    const shown = timed.filter((block) => whole || block.mine);
    const first = shown[0];
    const last = shown.at(-1);
    if (!first || !last) return [];
    return [
      {
        ...row,
        whole,
        from: whole ? startsAt : first.from,
        releasedAt: whole ? endsAt : last.to,
        blocks: shown.map(({ id, from, to, label, title, bars, detail }) => ({
          id,
          from,
          to,
          label,
          title,
          bars,
          detail,
        })),
      },
    ];
  });
}

async function ownBlocks(callIds: string[], mine: string[]) {
  if (callIds.length === 0) return new Map<string, never[]>();
  const [rows, theirs] = await Promise.all([
    db
      .select({
        id: blocks.id,
        callId: blocks.callId,
        kind: blocks.kind,
        minutes: blocks.minutes,
        blockTitle: blocks.title,
        bars: blocks.bars,
        detail: blocks.detail,
        label: numbers.label,
        numberTitle: numbers.title,
      })
      .from(blocks)
      .leftJoin(numbers, eq(numbers.id, blocks.numberId))
      .where(inArray(blocks.callId, callIds))
      .orderBy(asc(blocks.callId), asc(blocks.place)),
    db
      .select({ blockId: called.blockId })
      .from(called)
      .innerJoin(blocks, eq(blocks.id, called.blockId))
      .where(
        and(
          inArray(blocks.callId, callIds),
          inArray(called.personId, mine),
          eq(called.excused, false),
        ),
      ),
  ]);
  const ids = new Set(theirs.map((row) => row.blockId));
  return groupBy(
    rows.map(({ blockTitle, numberTitle, kind, ...block }) => ({
      ...block,
      title: numberTitle ?? blockTitle ?? BLOCK_KIND_NAMES[kind],
      mine: ids.has(block.id),
    })),
    (block) => block.callId,
  );
}
