"use client";

import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import type { SlotLost } from "@/lib/data/auditions/change-day";
import { StateMark } from "./state-mark";

type Props = { lost: readonly SlotLost[]; onKeep: () => void; onAgree: () => void | Promise<void> };

/** Asks once before a changed day takes people's times away, and names them. */
export function AgreeToLoss({ lost, onKeep, onAgree }: Props) {
  const told = lost.filter(
    (singer) => singer.state === "invited" || singer.state === "confirmed",
  ).length;
  return (
    <Dialog
      open
      onOpenChange={(open) => {
        if (!open) onKeep();
      }}
      title={
        lost.length === 1
          ? "One singer would lose their time"
          : `${String(lost.length)} singers would lose their time`
      }
      description="Their time does not exist in the changed day. They would wait for a new one; everyone else stays where they are."
    >
      <ul className="max-h-64 overflow-y-auto border-y border-rule">
        {lost.map((singer) => (
          <li
            key={singer.signUpId}
            className="flex justify-between gap-4 border-b border-rule py-2 last:border-b-0"
          >
            <span>
              {singer.time} {singer.name}, {singer.room}
            </span>
            <StateMark state={singer.state} className="text-sm" />
          </li>
        ))}
      </ul>
      {told > 0 && (
        <p className="text-sm text-ochre">
          {told === 1
            ? "One of them knows the old time"
            : `${String(told)} of them know the old time`}
          : nobody is written to until you give them a new one, so tell them.
        </p>
      )}
      <div className="flex flex-wrap justify-end gap-3">
        <Button onClick={onKeep}>Keep the day as it was</Button>
        <Button kind="danger" onClick={() => void onAgree()}>
          Change the day
        </Button>
      </div>
    </Dialog>
  );
}
