import { clockSpan, daysOrClocks } from "@/lib/format-dates";
import type { CallFacts, CallPlan, ClashInWords, FoundClash, Remedy } from "./types";

/**
 * A clash as people read it: who, what, by how many minutes, and what to do. Of what another company
 * does, the label of an engagement says no more than that the person is engaged.
 */
export function clashInWords(
  plan: CallPlan,
  facts: CallFacts,
  clash: FoundClash,
  remedies: Remedy[],
): ClashInWords {
  const conflict = facts.conflicts.find(({ id }) => id === clash.withId);
  return {
    id: `${clash.kind}-${clash.personId ?? "room"}-${clash.withId}`.replaceAll(" ", "-"),
    kind: clash.kind,
    personId: clash.personId,
    words: wordsOf(plan, facts, clash),
    conflict: conflict ? { id: conflict.id, state: conflict.state } : null,
    remedies,
    advice: adviceOf(plan, clash, remedies),
  };
}

function wordsOf(plan: CallPlan, facts: CallFacts, clash: FoundClash): string {
  const name = facts.names.get(clash.personId ?? "") ?? "Somebody";
  const minutes = `${Math.round(clash.minutes)} min`;
  if (clash.kind === "conflict") {
    const conflict = facts.conflicts.find(({ id }) => id === clash.withId);
    if (!conflict) return `${name} cannot come: ${minutes} of this call`;
    const why = conflict.reason === null ? "" : ` (${conflict.reason})`;
    const said = conflict.state === "agreed" ? "agreed" : "asked, not agreed yet";
    return `${name} cannot come ${daysOrClocks(conflict.from, conflict.to, plan.zone)}${why}, ${said}: ${minutes} of this call`;
  }
  if (clash.kind === "room") {
    const booking = facts.bookings[Number(clash.withId.split(" ")[1])];
    const room = facts.rooms.find(({ id }) => id === plan.roomId)?.name ?? "The room";
    if (!booking) return `${room} is taken: ${minutes} of this call`;
    return `${room} is taken by ${booking.label}, ${clockSpan(booking.from, booking.to, plan.zone)}: ${minutes} of this call`;
  }
  const engagement = facts.engagements.find(({ id }) => id === clash.withId);
  if (!engagement) return `${name} is engaged: ${minutes} of this call`;
  const busy = `${engagement.label}, ${clockSpan(engagement.from, engagement.to, plan.zone)}`;
  if (clash.kind !== "travel") return `${name} ${busy}: ${minutes} of this call`;
  const gap = Math.round((clash.to.getTime() - clash.from.getTime()) / 60_000);
  return `${name} ${busy}, and has ${gap} min for the way: ${minutes} short`;
}

function adviceOf(plan: CallPlan, clash: FoundClash, remedies: Remedy[]): string {
  if (remedies.length > 0) return "";
  if (clash.kind === "room") return "No other room is free then. Choose another day or time.";
  if (clash.personId === plan.pianistId)
    return "No other accompanist of the production is free then. Choose another day or time, or call without a pianist.";
  if (clash.personId === plan.leaderId)
    return "Choose somebody else to lead, or another day or time.";
  return "Choose another day or time, or leave them out.";
}
