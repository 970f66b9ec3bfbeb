"use client";

import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import type { AuditionDayView } from "@/lib/auditions/day-view";
import { toldBy, type Move } from "./use-moves";

type Props = { day: AuditionDayView; move: Move; onLeave: () => void; onAgree: () => void };

/** Asks once before somebody who knows their time gets another, or none. */
export function AskBeforeMove({ day, move, onLeave, onAgree }: Props) {
  const names = toldBy(day, move);
  const who = names.join(" and ");
  const one = names.length === 1;
  return (
    <Dialog
      open
      onOpenChange={(open) => {
        if (!open) onLeave();
      }}
      title={`${who} ${one ? "knows the time" : "know their times"} already`}
      description={
        move.slotId === null
          ? `Taking ${who} out frees the slot. Nobody is written to: tell ${one ? "them" : "both"} yourself, or give a new time and they are written to.`
          : `${one ? "They are" : "Both are"} written to with the new time and asked to confirm it.`
      }
    >
      <div className="flex flex-wrap justify-end gap-3">
        <Button onClick={onLeave}>Leave it as it is</Button>
        <Button kind="primary" onClick={onAgree}>
          {move.slotId === null ? "Take out" : "Move and write to them"}
        </Button>
      </div>
    </Dialog>
  );
}
