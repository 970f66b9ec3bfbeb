"use client";

import { useRef, useState, type PointerEvent } from "react";

/** So far the pointer moves before a press becomes a drag, in pixels. */
const FAR_ENOUGH = 6;

type Drag = { signUpId: string; over: string | null };

export type SlotDrag = {
  dragging: Drag | null;
  handlers: (signUpId: string | null) => {
    onPointerDown: (event: PointerEvent<HTMLElement>) => void;
    onPointerMove: (event: PointerEvent<HTMLElement>) => void;
    onPointerUp: (event: PointerEvent<HTMLElement>) => void;
    onPointerCancel: () => void;
  };
  /** Whether the click that follows belongs to a drag and means nothing. */
  wasDrag: () => boolean;
};

function slotUnder(event: PointerEvent<HTMLElement>): string | null {
  const found = document
    .elementFromPoint(event.clientX, event.clientY)
    ?.closest<HTMLElement>("[data-slot]");
  return found?.dataset["slot"] ?? null;
}

/** Dragging a singer with a mouse or pen. A finger scrolls; it presses the singer and then the slot instead. */
export function useSlotDrag(onDrop: (signUpId: string, slotId: string) => void): SlotDrag {
  const start = useRef<{ x: number; y: number; signUpId: string } | null>(null);
  const dragged = useRef(false);
  const [dragging, setDragging] = useState<Drag | null>(null);

  function end() {
    start.current = null;
    setDragging(null);
  }

  return {
    dragging,
    wasDrag: () => dragged.current,
    handlers: (signUpId) => ({
      onPointerDown: (event) => {
        dragged.current = false;
        if (signUpId === null || event.pointerType === "touch" || event.button !== 0) return;
        start.current = { x: event.clientX, y: event.clientY, signUpId };
      },
      onPointerMove: (event) => {
        const from = start.current;
        if (!from) return;
        if (
          !dragged.current &&
          Math.hypot(event.clientX - from.x, event.clientY - from.y) < FAR_ENOUGH
        )
          return;
        if (!dragged.current) event.currentTarget.setPointerCapture(event.pointerId);
        dragged.current = true;
        setDragging({ signUpId: from.signUpId, over: slotUnder(event) });
      },
      onPointerUp: (event) => {
        const from = start.current;
        const over = dragged.current ? slotUnder(event) : null;
        end();
        // The click of this drag comes before any timer; a key pressed later means what it says.
        setTimeout(() => {
          dragged.current = false;
        });
        if (from && over !== null) onDrop(from.signUpId, over);
      },
      onPointerCancel: end,
    }),
  };
}
