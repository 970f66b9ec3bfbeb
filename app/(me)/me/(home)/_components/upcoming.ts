import type { ChipTone } from "@/components/ui/chip";
import type { OwnSlot } from "@/lib/data/auditions/own";
import type { OwnCallback } from "@/lib/data/callbacks/own";
import type { OwnCall } from "@/lib/data/calls/own";
import type { OwnSession } from "@/lib/data/pianists/own";
import { CALL_KIND_NAMES } from "@/lib/calls/call-kinds";

/** One line of what is coming: where to be, for which work. */
export type Upcoming = {
  id: string;
  startsAt: Date;
  endsAt: Date;
  zone: string;
  production: string;
  what: string;
  where: string | null;
  /** What of it, for instance the numbers of a call. */
  detail: string | null;
  state: { words: string; tone: ChipTone } | null;
  /** Where more of it stands, or the answer can be changed. */
  link: { href: string; label: string } | null;
};

export function fromSlot(slot: OwnSlot): Upcoming {
  const declined = slot.state === "declined";
  return {
    id: slot.slotId,
    startsAt: slot.startsAt,
    endsAt: slot.endsAt,
    zone: slot.zone,
    production: slot.production,
    what: "Audition",
    where: `${slot.room}, ${slot.venue}`,
    detail: null,
    state: declined
      ? { words: "You can’t come", tone: "stretch" }
      : { words: "Confirmed", tone: "fits" },
    link: { href: `/me?answer=${slot.slotId}`, label: "Change" },
  };
}

export function fromCallback(callback: OwnCallback & { startsAt: Date }): Upcoming {
  return {
    id: callback.invitationId,
    startsAt: callback.startsAt,
    endsAt: callback.endsAt ?? callback.startsAt,
    zone: callback.zone,
    production: callback.production,
    what: `Callback, ${callback.roles.join(", ")}`,
    where: callback.room,
    detail: null,
    state:
      callback.answer === "no"
        ? { words: "You can’t come", tone: "stretch" }
        : { words: "You’ll be there", tone: "fits" },
    link: { href: `/me?answer=${callback.invitationId}`, label: "Change" },
  };
}

const place = (room: string | null, venue: string | null): string | null =>
  [room, venue].filter((part) => part !== null).join(", ") || null;

export function fromCall(call: OwnCall): Upcoming {
  const kind = CALL_KIND_NAMES[call.kind];
  return {
    id: call.callId,
    startsAt: call.from,
    endsAt: call.releasedAt,
    zone: call.zone,
    production: call.production,
    what: call.title === null ? kind : `${kind}: ${call.title}`,
    where: place(call.room, call.venue),
    detail: call.blocks
      .map((block) => [block.label, block.title].filter((part) => part !== null).join(" "))
      .join(" · "),
    state: null,
    link: null,
  };
}

export function fromSession(session: OwnSession): Upcoming {
  return {
    id: session.sessionId,
    startsAt: session.from,
    endsAt: session.to,
    zone: session.zone,
    production: session.production,
    what: `${session.what}, at the piano`,
    where: place(session.room, session.venue),
    detail: null,
    state: null,
    link: {
      href: `/me/sessions?open=${session.sessionId}#${session.sessionId}`,
      label: "The music",
    },
  };
}

/** Calls and sessions in one list; a call the person plays for is there once, as the session it is. */
export function fromWork(calls: readonly OwnCall[], sessions: readonly OwnSession[]): Upcoming[] {
  const played = (call: OwnCall): boolean =>
    call.whole &&
    sessions.some(
      (s) =>
        s.productionId === call.productionId &&
        s.from.getTime() === call.from.getTime() &&
        s.to.getTime() === call.releasedAt.getTime(),
    );
  return [...calls.filter((call) => !played(call)).map(fromCall), ...sessions.map(fromSession)];
}

export const inOrder = (items: readonly Upcoming[]): Upcoming[] =>
  items.toSorted((a, b) => a.startsAt.getTime() - b.startsAt.getTime());
