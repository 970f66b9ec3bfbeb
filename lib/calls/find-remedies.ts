import { clock } from "@/lib/format-dates";
import { blockTimes } from "@/lib/schedule/block-times";
import { overlaps } from "@/lib/schedule/overlaps";
import { toLocal } from "@/lib/schedule/to-local";
import { calledTo } from "./attending-runs";
import { findCallClashes } from "./find-call-clashes";
import type { CallFacts, CallPlan, FoundClash, PlannedBlock, Remedy } from "./types";

const AT_MOST = 2;

/**
 * What would solve a clash of a call, most useful first: another room that is free then, another
 * pianist who is, the blocks in another order, leaving the person out, the nearest start at which
 * nothing clashes (`freeStart`). Each is tried before it is offered: the clash is gone with it, and it
 * brings no new one.
 */
export function findRemedies(
  plan: CallPlan,
  facts: CallFacts,
  clash: FoundClash,
  freeStart: Date | null,
): Remedy[] {
  const before = findCallClashes(plan, facts);
  const solves = (changed: CallPlan): boolean => {
    const after = findCallClashes(changed, facts);
    return after.length < before.length && !after.some((other) => sameClash(other, clash));
  };
  const remedies: Remedy[] = [];
  if (clash.kind === "room") remedies.push(...otherRooms(plan, facts, solves));
  if (clash.personId !== null && clash.personId === plan.pianistId) {
    remedies.push(...otherPianists(plan, facts, solves));
  }
  if (
    clash.personId !== null &&
    clash.personId !== plan.pianistId &&
    clash.personId !== plan.leaderId
  ) {
    remedies.push(...otherOrder(plan, clash, clash.personId, solves));
    remedies.push(...withoutThem(plan, facts, clash, clash.personId, solves));
  }
  if (clash.kind === "travel") remedies.push(...otherRooms(plan, facts, solves));
  if (freeStart !== null && freeStart.getTime() !== plan.from.getTime()) {
    const local = toLocal(freeStart, plan.zone);
    remedies.push({
      kind: "start",
      label: `Start at ${local.time}, when nothing clashes`,
      localDate: local.date,
      localTime: local.time,
    });
  }
  return remedies;
}

function sameClash(a: FoundClash, b: FoundClash): boolean {
  return a.kind === b.kind && a.personId === b.personId && a.withId === b.withId;
}

type Test = (changed: CallPlan) => boolean;

function otherRooms(plan: CallPlan, facts: CallFacts, solves: Test): Remedy[] {
  const own = facts.rooms.find((room) => room.id === plan.roomId);
  const distance = (room: CallFacts["rooms"][number]): number =>
    (room.venueId === own?.venueId ? 0 : 2) + (plan.pianistId !== null && !room.hasPiano ? 1 : 0);
  return facts.rooms
    .filter((room) => room.id !== plan.roomId)
    .sort((a, b) => distance(a) - distance(b) || (a.name < b.name ? -1 : 1))
    .filter((room) => solves({ ...plan, roomId: room.id }))
    .slice(0, AT_MOST)
    .map((room) => {
      const where = room.venueId === own?.venueId ? "" : `, ${room.venueName}`;
      const piano = plan.pianistId !== null && !room.hasPiano ? " (no piano)" : "";
      return { kind: "room", label: `Take ${room.name}${where}${piano}`, roomId: room.id };
    });
}

function otherPianists(plan: CallPlan, facts: CallFacts, solves: Test): Remedy[] {
  return facts.pianists
    .filter(
      ({ personId }) => personId !== plan.pianistId && solves({ ...plan, pianistId: personId }),
    )
    .slice(0, AT_MOST)
    .map(({ personId, name }) => ({ kind: "pianist", label: `${name} plays instead`, personId }));
}

/** Warm-ups and breaks keep their places; only what is worked on changes order. */
const moves = (block: PlannedBlock): boolean => block.kind === "number" || block.kind === "scene";

function otherOrder(plan: CallPlan, clash: FoundClash, personId: string, solves: Test): Remedy[] {
  const needing = plan.blocks.filter((block) => moves(block) && calledTo(block).includes(personId));
  const rest = plan.blocks.filter((block) => moves(block) && !needing.includes(block));
  if (needing.length === 0 || rest.length === 0) return [];
  const names = listOf(needing.map((block) => block.title));
  for (const [order, where] of [
    [[...rest, ...needing], "after"],
    [[...needing, ...rest], "before"],
  ] as const) {
    const queue = [...order];
    const blocks = blockTimes(
      plan.from,
      plan.blocks.map((block) => (moves(block) ? (queue.shift() ?? block) : block)),
    );
    if (!solves({ ...plan, blocks })) continue;
    const at = where === "after" ? clash.to : clash.from;
    return [
      {
        kind: "order",
        label: `Move ${names} ${where} ${clock(at, plan.zone)}`,
        keys: blocks.map((block) => block.key),
      },
    ];
  }
  return [];
}

function withoutThem(
  plan: CallPlan,
  facts: CallFacts,
  clash: FoundClash,
  personId: string,
  solves: Test,
): Remedy[] {
  const theirs = plan.blocks.filter((block) => calledTo(block).includes(personId));
  const met = theirs.filter((block) => overlaps(block, clash));
  const name = facts.names.get(personId) ?? "them";
  for (const leave of met.length > 0 && met.length < theirs.length ? [met, theirs] : [theirs]) {
    const blocks = plan.blocks.map((block) =>
      leave.includes(block)
        ? { ...block, called: block.called.filter((person) => person.personId !== personId) }
        : block,
    );
    if (!solves({ ...plan, blocks })) continue;
    const from =
      leave.length === theirs.length ? "" : ` out of ${listOf(leave.map((b) => b.title))}`;
    return [
      {
        kind: "excuse",
        label: from === "" ? `Leave ${name} out` : `Leave ${name}${from}`,
        personId,
        reason: clash.kind === "conflict" ? "Has a conflict" : "Is called elsewhere",
        keys: leave.map((block) => block.key),
      },
    ];
  }
  return [];
}

function listOf(names: readonly string[]): string {
  if (names.length < 2) return names.join("");
  return `${names.slice(0, -1).join(", ")} and ${names.at(-1) ?? ""}`;
}
