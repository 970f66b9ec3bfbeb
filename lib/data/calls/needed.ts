import "server-only";
import { and, asc, eq, inArray, isNull } from "drizzle-orm";
import { db } from "@/db/client";
import type { Db, Tx } from "@/db/client";
import { choices, numbers, people, positions, roles, rooms, vocalLines } from "@/db/schema";
import { BLOCK_KIND_NAMES } from "@/lib/calls/call-kinds";
import type { CallPlan, CalledPerson, PlannedBlock } from "@/lib/calls/types";
import type { ProductionScope } from "@/lib/data/guard";
import { AppError } from "@/lib/errors";
import { groupBy } from "@/lib/group-by";
import { blockTimes } from "@/lib/schedule/block-times";
import { toInstant } from "@/lib/schedule/to-instant";
import { whoIsNeeded } from "@/lib/schedule/who-is-needed";
import type { CallDraft } from "@/lib/schemas/calls";

export type ScoreAndCast = {
  numbers: Map<string, { label: string; title: string }>;
  lines: { roleId: string; numberId: string }[];
  roleNames: Map<string, string>;
  /** Principals and alternates: who the score needs. */
  cast: { roleId: string; personId: string }[];
  /** Covers and swings: called only by choice. */
  covers: { roleId: string; personId: string }[];
};

/** What is kept of a saved call when somebody from whom the casting is hidden plans it. */
export type HiddenCast = {
  /** The call as it is published; null for a draft or a new call. */
  standing: CallPlan | null;
  /** Who was let off: not theirs to see, and not theirs to lose. */
  excuses: CallDraft["hand"];
};

/** What the roles of a production sing and who is cast in them, in the order of the roles. Asks no permission: the caller has. */
export async function readScoreAndCast(tx: Db | Tx, productionId: string): Promise<ScoreAndCast> {
  const [numberRows, lines, roleRows, chosen] = await Promise.all([
    tx
      .select({ id: numbers.id, label: numbers.label, title: numbers.title })
      .from(numbers)
      .where(and(eq(numbers.productionId, productionId), isNull(numbers.removedAt))),
    tx
      .select({ roleId: vocalLines.roleId, numberId: vocalLines.numberId })
      .from(vocalLines)
      .innerJoin(roles, and(eq(roles.id, vocalLines.roleId), isNull(roles.removedAt)))
      .where(eq(roles.productionId, productionId))
      .orderBy(asc(roles.place)),
    tx
      .select({ id: roles.id, name: roles.name })
      .from(roles)
      .where(and(eq(roles.productionId, productionId), isNull(roles.removedAt))),
    tx
      .select({ roleId: choices.roleId, personId: choices.personId, kind: choices.kind })
      .from(choices)
      .innerJoin(roles, and(eq(roles.id, choices.roleId), isNull(roles.removedAt)))
      .innerJoin(people, eq(people.id, choices.personId))
      .where(and(eq(choices.productionId, productionId), eq(choices.state, "cast")))
      .orderBy(asc(roles.place), asc(choices.kind), asc(people.name)),
  ]);
  const only = (kinds: string[]) =>
    chosen
      .filter((choice) => kinds.includes(choice.kind))
      .map(({ roleId, personId }) => ({ roleId, personId }));
  return {
    numbers: new Map(numberRows.map(({ id, ...number }) => [id, number])),
    lines,
    roleNames: new Map(roleRows.map((role) => [role.id, role.name])),
    cast: only(["principal", "alternate"]),
    covers: only(["cover", "swing"]),
  };
}

/**
 * A call from its form: times of the blocks, who the score needs, and what was changed by hand. Every id is checked to
 * belong to this production or its company; one that does not is refused beside its field. With `hidden`, whoever plans it
 * may not see the casting: blocks of a published call keep the people of the score they have, and who is called by hand
 * is that even where the score needs them, so that nothing tells that it does.
 */
export async function planCall(
  scope: ProductionScope,
  draft: CallDraft,
  callId: string | null,
  hidden: HiddenCast | null,
): Promise<{ plan: CallPlan; score: ScoreAndCast; note: "skipped" | "repeated" | null }> {
  const score = await readScoreAndCast(db, scope.id);
  await assertTheirs(scope, draft, score);
  const { instant, note } = toInstant(draft.localDate, draft.localTime, scope.zone);
  const needs = whoIsNeeded({
    blocks: draft.blocks.map((block) => ({
      id: block.key,
      numberId: block.kind === "number" ? block.numberId : null,
    })),
    lines: score.lines,
    cast: score.cast,
  });
  const hand = [...draft.hand, ...(hidden?.excuses ?? [])];
  const blocks = blockTimes(instant, draft.blocks).map((block): PlannedBlock => {
    const need = needs.find(({ blockId }) => blockId === block.key);
    const numberId = block.kind === "number" ? block.numberId : null;
    const stood = hidden?.standing?.blocks.find(
      (one) => one.key === block.key && one.numberId === numberId,
    );
    const number = block.kind === "number" ? score.numbers.get(block.numberId ?? "") : undefined;
    const roleName = (roleId: string): string => score.roleNames.get(roleId) ?? "";
    const byScore = scoreCalls(need?.people ?? [], stood, (personId) => {
      const byHandToo = hand.some(
        (change) =>
          change.act === "call" && change.personId === personId && covers(change, block.key),
      );
      return hidden !== null && byHandToo;
    }).map(({ personId, roleIds }): CalledPerson => {
      const letOff = hand.find(
        (change) =>
          change.act === "excuse" && change.personId === personId && covers(change, block.key),
      );
      return {
        personId,
        roleNames: roleIds.map(roleName),
        source: "score",
        reason: letOff?.reason ?? null,
        excused: letOff !== undefined,
      };
    });
    return {
      key: block.key,
      kind: block.kind,
      minutes: block.minutes,
      numberId,
      label: number?.label ?? null,
      title: number?.title ?? block.title ?? BLOCK_KIND_NAMES[block.kind],
      bars: block.bars,
      detail: block.detail,
      from: block.from,
      to: block.to,
      called: block.kind === "break" ? [] : [...byScore, ...byHand(draft, block.key, byScore)],
      uncastRoles: (need?.uncastRoleIds ?? []).map(roleName),
    };
  });
  const to = blocks.at(-1)?.to ?? instant;
  return {
    plan: {
      callId,
      zone: scope.zone,
      from: instant,
      to,
      roomId: draft.roomId,
      leaderId: draft.leaderId,
      pianistId: draft.pianistId,
      blocks,
    },
    score,
    note: note ?? null,
  };
}

/** Whom the score calls to a block: as it stood in a published call, else whom it needs now; `yields` to a call by hand. */
function scoreCalls(
  needed: readonly { personId: string; roleIds: string[] }[],
  stood: PlannedBlock | undefined,
  yields: (personId: string) => boolean,
): { personId: string; roleIds: string[] }[] {
  if (!stood) return needed.filter(({ personId }) => !yields(personId));
  return stood.called
    .filter((person) => person.source === "score" && !(person.excused && yields(person.personId)))
    .map(({ personId }) => ({
      personId,
      roleIds: needed.find((need) => need.personId === personId)?.roleIds ?? [],
    }));
}

type HandChange = CallDraft["hand"][number];

const covers = (change: HandChange, key: string): boolean =>
  change.keys.length === 0 || change.keys.includes(key);

/** People called extra; someone the score needs anyway stays called by the score. */
function byHand(draft: CallDraft, key: string, byScore: CalledPerson[]): CalledPerson[] {
  const extra = new Map<string, CalledPerson>();
  for (const change of draft.hand) {
    if (change.act !== "call" || !covers(change, key)) continue;
    if (byScore.some((person) => person.personId === change.personId)) continue;
    extra.set(change.personId, {
      personId: change.personId,
      roleNames: [],
      source: "hand",
      reason: change.reason,
      excused: false,
    });
  }
  return [...extra.values()];
}

/** Ids from a form are only believed once they are found in this production (or its company, for rooms). */
async function assertTheirs(
  scope: ProductionScope,
  draft: CallDraft,
  score: ScoreAndCast,
): Promise<void> {
  const fields: Record<string, string> = {};
  draft.blocks.forEach((block, index) => {
    if (block.kind === "number" && !score.numbers.has(block.numberId ?? "")) {
      fields[`blocks.${index}.numberId`] =
        "This number is not in the score any more. Choose another.";
    }
  });
  if (draft.roomId !== null) {
    const [room] = await db
      .select({ id: rooms.id })
      .from(rooms)
      .where(and(eq(rooms.id, draft.roomId), eq(rooms.companyId, scope.companyId)));
    if (!room) fields["roomId"] = "This room is not there any more. Choose another.";
  }
  const asked = [
    draft.leaderId,
    draft.pianistId,
    ...draft.hand.filter(({ act }) => act === "call").map(({ personId }) => personId),
  ];
  const held = await kindsHeld(
    scope,
    asked.filter((id) => id !== null),
  );
  const holds = (personId: string | null, kinds?: readonly string[]): boolean =>
    personId === null ||
    (held.get(personId)?.some((kind) => kinds === undefined || kinds.includes(kind)) ?? false);
  if (!holds(draft.leaderId))
    fields["leaderId"] = "This person has no position in the production. Choose another.";
  if (!holds(draft.pianistId, AT_THE_PIANO))
    fields["pianistId"] = "This person does not play for the production. Choose another.";
  if (draft.hand.some((change) => change.act === "call" && !holds(change.personId))) {
    fields["hand"] =
      "Somebody called by hand has no position in the production any more. Take them out.";
  }
  if (Object.keys(fields).length > 0) throw new AppError("invalid", undefined, { fields });
}

/** Music directors often play their own calls. */
export const AT_THE_PIANO = ["accompanist", "music_director", "assistant_md"] as const;

async function kindsHeld(
  scope: ProductionScope,
  personIds: string[],
): Promise<Map<string, string[]>> {
  if (personIds.length === 0) return new Map();
  const rows = await db
    .select({ personId: positions.personId, kind: positions.kind })
    .from(positions)
    .where(
      and(
        inArray(positions.personId, personIds),
        eq(positions.productionId, scope.id),
        eq(positions.companyId, scope.companyId),
        isNull(positions.endedAt),
      ),
    );
  return new Map(
    [...groupBy(rows, (row) => row.personId)].map(([personId, theirs]) => [
      personId,
      theirs.map(({ kind }) => kind),
    ]),
  );
}
