import "server-only";
import { and, asc, eq, gt, isNull, lt } from "drizzle-orm";
import { db } from "@/db/client";
import { calls, conflicts, people, positions } from "@/db/schema";
import type { CallSheet, CallSheetBlock } from "@/lib/call-sheets/types";
import { calledTo } from "@/lib/calls/attending-runs";
import { BLOCK_KIND_NAMES, CALL_KIND_NAMES } from "@/lib/calls/call-kinds";
import type { CallPlan } from "@/lib/calls/types";
import { nextCalls } from "@/lib/data/calls/list";
import { readScoreAndCast } from "@/lib/data/calls/needed";
import { savedCalls, savedPlans } from "@/lib/data/calls/saved";
import type { SavedCall } from "@/lib/data/calls/saved";
import type { ProductionScope } from "@/lib/data/guard";
import { clock, clockSpan, shortDay } from "@/lib/format-dates";
import { localDateRange } from "@/lib/schedule/local-date-range";
import { releaseTimes } from "@/lib/schedule/release-times";

/** One person's part of a sheet: which of its blocks are theirs, and from when until when they are needed. */
export type OwnPart = {
  name: string;
  blockIds: string[];
  from: string;
  releasedAt: string;
  /** Of what comes next, the calls this person is called to, leads or plays for; issues from before have none. */
  tomorrow?: string[];
};

export type ComposedSheet = {
  /** Without what only issuing gives: number, time, changes. */
  sheet: Omit<CallSheet, "issueNumber" | "issuedAt" | "replaces" | "changed">;
  people: Record<string, OwnPart>;
};

/** The call sheet of a local day as it would go out now, from the published calls of the day. Asks no permission: the caller has. */
export async function composeSheet(
  scope: ProductionScope,
  localDate: string,
): Promise<ComposedSheet> {
  const [saved, score] = await Promise.all([
    savedCalls(scope.id, and(eq(calls.localDate, localDate), eq(calls.state, "published"))),
    readScoreAndCast(db, scope.id),
  ]);
  const { plans, names } = await savedPlans(score, saved);
  const planned = saved.flatMap((call) => {
    const plan = plans.get(call.id);
    return plan ? [{ call, plan }] : [];
  });
  const nameOf = (personId: string): string => names.get(personId) ?? "";
  const [tomorrow, away, contact] = await Promise.all([
    nextCalls(scope.id, localDate),
    awayOn(scope, localDate),
    stageManager(scope),
  ]);
  const next = await savedPlans(score, tomorrow);
  const nextOf = tomorrow.map((call) => {
    const plan = next.plans.get(call.id);
    const called = plan ? partsOf([{ call, plan }], nameOf) : {};
    return { line: nextLine(call, scope), called };
  });
  const people = Object.fromEntries(
    Object.entries(partsOf(planned, nameOf)).map(([personId, part]) => [
      personId,
      {
        ...part,
        tomorrow: nextOf.filter(({ called }) => personId in called).map(({ line }) => line),
      },
    ]),
  );
  return {
    sheet: {
      productionTitle: scope.title,
      companyName: scope.companyName,
      localDate,
      zone: scope.zone,
      blocks: planned.flatMap(({ call, plan }) =>
        plan.blocks.map((block) => sheetBlock(call, block, nameOf)),
      ),
      released: releasesOf(planned.map(({ plan }) => plan)).map(({ personId, release }) => ({
        who: nameOf(personId),
        at: clock(release, scope.zone),
      })),
      music: planned.flatMap(({ call, plan }) => musicLines(call, plan, planned.length > 1)),
      tomorrow: nextOf.map(({ line }) => line),
      away,
      notes: placesOf(saved),
      ...(contact === null ? {} : { contact }),
    },
    people,
  };
}

type Planned = { call: SavedCall; plan: CallPlan }[];

function sheetBlock(
  call: SavedCall,
  block: CallPlan["blocks"][number],
  nameOf: (id: string) => string,
): CallSheetBlock {
  const detail = [
    call.kind === "music" ? "" : CALL_KIND_NAMES[call.kind].toLowerCase(),
    block.detail ?? "",
  ]
    .filter((part) => part !== "")
    .join(", ");
  return {
    id: block.key,
    from: clock(block.from, call.zone),
    to: clock(block.to, call.zone),
    kind: BLOCK_KIND_NAMES[block.kind],
    title: block.title,
    who: calledTo(block).map(nameOf),
    where: block.kind === "break" ? "" : (call.room ?? ""),
    ...(block.label === null ? {} : { numberLabel: block.label }),
    ...(detail === "" || block.kind === "break" ? {} : { detail }),
    ...(block.bars === null ? {} : { bars: block.bars }),
    ...(call.pianist === null || block.kind === "break" ? {} : { pianist: call.pianist }),
  };
}

function releasesOf(plans: CallPlan[]) {
  return releaseTimes(
    plans.flatMap((plan) =>
      plan.blocks.map((block) => ({ from: block.from, to: block.to, people: calledTo(block) })),
    ),
  );
}

/** Who it concerns: everyone called, and whoever leads or plays, who are there for the whole of their calls. */
function partsOf(planned: Planned, nameOf: (id: string) => string): Record<string, OwnPart> {
  const parts = new Map<
    string,
    { name: string; blocks: CallPlan["blocks"]; from: Date; to: Date }
  >();
  const add = (
    personId: string,
    name: string,
    blocks: CallPlan["blocks"],
    time: { from: Date; to: Date },
  ): void => {
    const seen = parts.get(personId);
    parts.set(personId, {
      name,
      blocks: [...(seen?.blocks ?? []), ...blocks],
      from: seen && seen.from < time.from ? seen.from : time.from,
      to: seen && seen.to > time.to ? seen.to : time.to,
    });
  };
  for (const { call, plan } of planned) {
    const whole = new Map([
      [call.leaderId, call.leader],
      [call.pianistId, call.pianist],
    ]);
    for (const [personId, name] of whole)
      if (personId !== null) add(personId, name ?? "", plan.blocks, plan);
    for (const block of plan.blocks) {
      for (const personId of calledTo(block))
        if (!whole.has(personId)) add(personId, nameOf(personId), [block], block);
    }
  }
  const zone = planned[0]?.call.zone ?? "UTC";
  return Object.fromEntries(
    [...parts].map(([personId, part]) => [
      personId,
      {
        name: part.name,
        blockIds: part.blocks.map((block) => block.key),
        from: clock(part.from, zone),
        releasedAt: clock(part.to, zone),
      },
    ]),
  );
}

function musicLines(call: SavedCall, plan: CallPlan, several: boolean): string[] {
  const breaks = plan.blocks
    .filter((block) => block.kind === "break")
    .map((block) => clockSpan(block.from, block.to, call.zone));
  const when = several ? ` from ${clock(plan.from, call.zone)}` : "";
  return [
    ...(call.leader === null ? [] : [`${call.leader} leads${when}`]),
    ...(call.pianist === null
      ? []
      : [
          `${call.pianist} at the piano${when}${breaks.length === 0 ? "" : `, rests ${breaks.join(" and ")}`}`,
        ]),
  ];
}

function nextLine(call: SavedCall, scope: ProductionScope): string {
  return [
    shortDay(call.localDate, scope.locale),
    clock(call.startsAt, call.zone),
    CALL_KIND_NAMES[call.kind].toLowerCase(),
    call.room,
  ]
    .filter((part) => part !== null)
    .join(", ");
}

/** Singers whose conflict on that day is agreed: when, never why. */
async function awayOn(scope: ProductionScope, localDate: string): Promise<string[]> {
  const day = localDateRange(localDate, scope.zone);
  const rows = await db
    .selectDistinct({
      id: conflicts.id,
      name: people.name,
      from: conflicts.startsAt,
      to: conflicts.endsAt,
    })
    .from(conflicts)
    .innerJoin(people, eq(people.id, conflicts.personId))
    .innerJoin(
      positions,
      and(
        eq(positions.personId, people.id),
        eq(positions.productionId, scope.id),
        isNull(positions.endedAt),
      ),
    )
    .where(
      and(
        eq(conflicts.state, "agreed"),
        isNull(conflicts.removedAt),
        lt(conflicts.startsAt, day.to),
        gt(conflicts.endsAt, day.from),
      ),
    )
    .orderBy(asc(people.name));
  return rows.map(({ name, from, to }) => {
    if (from <= day.from && to >= day.to) return `${name} (agreed)`;
    if (from <= day.from) return `${name} until ${clock(to, scope.zone)} (agreed)`;
    if (to >= day.to) return `${name} from ${clock(from, scope.zone)} (agreed)`;
    return `${name} ${clockSpan(from, to, scope.zone)} (agreed)`;
  });
}

async function stageManager(scope: ProductionScope): Promise<string | null> {
  const [row] = await db
    .select({ name: people.name, phone: people.phone })
    .from(positions)
    .innerJoin(people, eq(people.id, positions.personId))
    .where(
      and(
        eq(positions.productionId, scope.id),
        eq(positions.kind, "stage_manager"),
        isNull(positions.endedAt),
        isNull(people.removedAt),
      ),
    )
    .orderBy(asc(people.name))
    .limit(1);
  if (!row) return null;
  return row.phone === null
    ? `Late? Tell ${row.name}, stage manager`
    : `Late? ${row.name}, stage manager, ${row.phone}`;
}

/** "Room 2, Lantern Street, 4 Quay Lane", once for each room of the day. */
function placesOf(saved: SavedCall[]): string[] {
  const lines = saved.map((call) =>
    [call.room, call.venue, call.address].filter((part) => part !== null && part !== "").join(", "),
  );
  return [...new Set(lines)].filter((line) => line !== "");
}
