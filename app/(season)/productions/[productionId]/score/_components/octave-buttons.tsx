"use client";

import { useState } from "react";
import { PendingButton } from "@/components/ui/pending-button";
import { showToast } from "@/components/ui/toast-store";
import { shiftPart } from "../actions";
import { tell } from "./tell";

export type PartShift = { productionId: string; scorePartId: string; octaveShift: number };

/** Puts the part `by` octaves from where it is now, and says so with the way back. */
export async function shiftBy(part: PartShift, by: number): Promise<void> {
  const { productionId, scorePartId, octaveShift } = part;
  if (!(await tell(shiftPart({ productionId, scorePartId, octaveShift: octaveShift + by }))))
    return;
  showToast({
    title: `Put an octave ${by > 0 ? "up" : "down"}.`,
    undo: async () => {
      await tell(shiftPart({ productionId, scorePartId, octaveShift }));
    },
  });
}

/** An octave up or down for a line that was read. */
export function OctaveButtons(part: PartShift) {
  const [pending, setPending] = useState(0);
  const button = (by: -1 | 1) => (
    <PendingButton
      size="small"
      pending={pending === by}
      onClick={() => {
        if (pending !== 0) return;
        setPending(by);
        void shiftBy(part, by).then(() => {
          setPending(0);
        });
      }}
    >
      {by > 0 ? "Octave up" : "Octave down"}
    </PendingButton>
  );
  return (
    <>
      {part.octaveShift > -2 && button(-1)}
      {part.octaveShift < 2 && button(1)}
    </>
  );
}
