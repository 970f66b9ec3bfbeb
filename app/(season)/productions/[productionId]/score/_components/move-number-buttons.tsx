"use client";

import { useState } from "react";
import { PendingButton } from "@/components/ui/pending-button";
import { moveNumber } from "../actions";
import { tell } from "./tell";

type Props = { productionId: string; numberId: string; first: boolean; last: boolean };

/** Moves a number in the running order, one place a press. */
export function MoveNumberButtons({ productionId, numberId, first, last }: Props) {
  const [pending, setPending] = useState<"up" | "down" | null>(null);
  async function move(direction: "up" | "down") {
    setPending(direction);
    await tell(moveNumber({ productionId, numberId, direction }));
    setPending(null);
  }
  // At either end the button stays where it is and answers nothing, so that a hand or the focus does not lose it.
  return (
    <>
      <PendingButton
        pending={pending === "up"}
        aria-disabled={first || undefined}
        onClick={() => {
          if (!first && !pending) void move("up");
        }}
      >
        Move up
      </PendingButton>
      <PendingButton
        pending={pending === "down"}
        aria-disabled={last || undefined}
        onClick={() => {
          if (!last && !pending) void move("down");
        }}
      >
        Move down
      </PendingButton>
    </>
  );
}
