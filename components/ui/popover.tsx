"use client";

import * as RadixPopover from "radix-ui/popover";
import type { ReactNode } from "react";
import { cx } from "./cx";

export type PopoverProps = {
  trigger: ReactNode;
  /** Names the panel for screen readers. */
  label: string;
  children: ReactNode;
  align?: "start" | "center" | "end";
  side?: "top" | "right" | "bottom" | "left";
  className?: string;
  open?: boolean;
  onOpenChange?: (open: boolean) => void;
};

/** A small panel beside the button that opened it. */
export function Popover({
  trigger,
  label,
  children,
  align = "start",
  side = "bottom",
  className,
  open,
  onOpenChange,
}: PopoverProps) {
  return (
    <RadixPopover.Root
      {...(open !== undefined && { open })}
      {...(onOpenChange && { onOpenChange })}
    >
      <RadixPopover.Trigger asChild>{trigger}</RadixPopover.Trigger>
      <RadixPopover.Portal>
        <RadixPopover.Content
          aria-label={label}
          align={align}
          side={side}
          sideOffset={6}
          collisionPadding={12}
          className={cx(
            "z-50 max-h-(--radix-popover-content-available-height) w-80 max-w-[calc(100vw-1.5rem)] animate-appear overflow-y-auto rounded-md border border-ink bg-sheet p-4 text-sm text-ink outline-none",
            className,
          )}
        >
          {children}
        </RadixPopover.Content>
      </RadixPopover.Portal>
    </RadixPopover.Root>
  );
}
