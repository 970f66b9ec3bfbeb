import type { OwnSlot } from "@/lib/data/auditions/own";
import type { OwnCallback } from "@/lib/data/callbacks/own";
import type { OwnInvitation } from "@/lib/data/invitations";
import type { OwnSheetListed } from "@/lib/data/sheets/own";
import { fromCallback, fromSlot } from "./upcoming";
import type { Upcoming } from "./upcoming";

export type Decision =
  | { kind: "invitation"; id: string; invitation: OwnInvitation }
  | { kind: "slot"; id: string; slot: OwnSlot }
  | { kind: "callback"; id: string; callback: OwnCallback }
  | { kind: "sheet"; id: string; sheet: OwnSheetListed };

export type Own = {
  invitations: readonly OwnInvitation[];
  slots: readonly OwnSlot[];
  callbacks: readonly OwnCallback[];
  sheets: readonly OwnSheetListed[];
};

export type Chosen = {
  /** The one decision of this screen: the one asked for, else the first that waits. */
  shown: Decision | null;
  /** What waits besides. */
  waiting: Decision[];
  /** What is settled and still to come. */
  upcoming: Upcoming[];
};

/** Puts what is a person's own in the order in which it needs them; `asked` is the id in the page's address. */
export function chooseDecision(own: Own, asked: unknown, now: Date): Chosen {
  const slots = own.slots.filter((slot) => slot.startsAt > now);
  const callbacks = own.callbacks.filter(
    (callback) => callback.endsAt === null || callback.endsAt > now,
  );
  const open: Decision[] = [
    ...own.invitations.map((invitation) => ({
      kind: "invitation" as const,
      id: invitation.id,
      invitation,
    })),
    ...slots.filter((slot) => slot.state === "invited").map(slotDecision),
    ...callbacks.filter((callback) => callback.answer === null).map(callbackDecision),
    ...own.sheets
      .filter((sheet) => sheet.acknowledgedAt === null)
      .map((sheet) => ({ kind: "sheet" as const, id: sheet.issueId, sheet })),
  ];
  const settled = [
    ...slots.filter((slot) => slot.state !== "invited").map(slotDecision),
    ...callbacks.filter((callback) => callback.answer !== null).map(callbackDecision),
  ];
  const shown = [...open, ...settled].find((decision) => decision.id === asked) ?? open[0] ?? null;
  return {
    shown,
    waiting: open.filter((decision) => decision !== shown),
    upcoming: settled.filter((decision) => decision !== shown).flatMap(toUpcoming),
  };
}

const slotDecision = (slot: OwnSlot): Decision => ({ kind: "slot", id: slot.slotId, slot });
const callbackDecision = (callback: OwnCallback): Decision => ({
  kind: "callback",
  id: callback.invitationId,
  callback,
});

function toUpcoming(decision: Decision): Upcoming[] {
  switch (decision.kind) {
    case "invitation":
    case "sheet":
      return [];
    case "slot":
      return [fromSlot(decision.slot)];
    case "callback": {
      const { startsAt } = decision.callback;
      return startsAt === null ? [] : [fromCallback({ ...decision.callback, startsAt })];
    }
  }
}
