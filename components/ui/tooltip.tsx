"use client";

import * as RadixTooltip from "radix-ui/tooltip";
import type { ReactNode } from "react";

/** More words about a control, on hover and focus. Nothing that is needed may be only here. */
export function Tooltip({ text, children }: { text: ReactNode; children: ReactNode }) {
  return (
    <RadixTooltip.Provider delayDuration={300}>
      <RadixTooltip.Root>
        <RadixTooltip.Trigger asChild>{children}</RadixTooltip.Trigger>
        <RadixTooltip.Portal>
          <RadixTooltip.Content
            sideOffset={4}
            collisionPadding={8}
            className="z-50 max-w-64 animate-appear rounded-sm bg-ink px-2.5 py-1.5 text-xs text-paper"
          >
            {text}
          </RadixTooltip.Content>
        </RadixTooltip.Portal>
      </RadixTooltip.Root>
    </RadixTooltip.Provider>
  );
}
