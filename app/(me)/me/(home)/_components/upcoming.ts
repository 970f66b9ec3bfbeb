import type { ChipTone } from "@/components/ui/chip";
import type { OwnSlot } from "@/lib/data/auditions/own";
import type { OwnCallback } from "@/lib/data/callbacks/own";

/** One line of what is coming: where to be, for which work. */
export type Upcoming = {
  id: string;
  startsAt: Date;
  endsAt: Date;
  zone: string;
  production: string;
  what: string;
  where: string | null;
  state: { words: string; tone: ChipTone } | null;
  /** Where the answer can be changed. */
  changeHref: string | null;
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
    state: declined
      ? { words: "You can’t come", tone: "stretch" }
      : { words: "Confirmed", tone: "fits" },
    changeHref: `/me?answer=${slot.slotId}`,
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
    state:
      callback.answer === "no"
        ? { words: "You can’t come", tone: "stretch" }
        : { words: "You’ll be there", tone: "fits" },
    changeHref: `/me?answer=${callback.invitationId}`,
  };
}
