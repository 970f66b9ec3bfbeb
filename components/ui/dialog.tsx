"use client";

import * as RadixDialog from "radix-ui/dialog";
import type { ReactNode } from "react";
import { CloseIcon } from "./icons";
import { overlayClass, panelClass } from "./panel";

export type DialogProps = {
  title: ReactNode;
  /** One sentence that says what this is for; read when the dialog opens. */
  description?: ReactNode;
  children: ReactNode;
  /** The button that opens it; leave out where the parent holds `open`. */
  trigger?: ReactNode;
  open?: boolean;
  onOpenChange?: (open: boolean) => void;
};

/** A task of its own over the page. Escape and the cross leave it; focus goes back to the trigger. */
export function Dialog({ title, description, children, trigger, open, onOpenChange }: DialogProps) {
  return (
    <RadixDialog.Root {...(open !== undefined && { open })} {...(onOpenChange && { onOpenChange })}>
      {trigger && <RadixDialog.Trigger asChild>{trigger}</RadixDialog.Trigger>}
      <RadixDialog.Portal>
        <RadixDialog.Overlay className={overlayClass} />
        <RadixDialog.Content
          className={panelClass}
          {...(!description && { "aria-describedby": undefined })}
        >
          <div className="flex items-start justify-between gap-4">
            <RadixDialog.Title className="text-2xl">{title}</RadixDialog.Title>
            <RadixDialog.Close
              aria-label="Close"
              className="-mt-1.5 -mr-2 grid size-11 shrink-0 place-items-center rounded-md hover:bg-bone"
            >
              <CloseIcon />
            </RadixDialog.Close>
          </div>
          {description && (
            <RadixDialog.Description className="text-sm text-ink-2">
              {description}
            </RadixDialog.Description>
          )}
          {children}
        </RadixDialog.Content>
      </RadixDialog.Portal>
    </RadixDialog.Root>
  );
}

/** Wraps a button inside a dialog so that it also closes it. */
export function DialogClose({ children }: { children: ReactNode }) {
  return <RadixDialog.Close asChild>{children}</RadixDialog.Close>;
}
