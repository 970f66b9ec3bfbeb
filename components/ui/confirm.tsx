"use client";

import * as AlertDialog from "radix-ui/alert-dialog";
import { useState, type ReactNode } from "react";
import { Button, type ButtonKind } from "./button";
import { overlayClass, panelClass } from "./panel";
import { PendingButton } from "./pending-button";

export type ConfirmProps = {
  /** The button that asks. */
  trigger: ReactNode;
  title: ReactNode;
  /** What goes, and whether it can come back. */
  children: ReactNode;
  /** The act in a verb: "Delete the day". */
  confirmLabel: string;
  cancelLabel?: string;
  /** "primary" for what is sent rather than destroyed. */
  confirmKind?: ButtonKind;
  /** Closes when the promise resolves to anything but `{ ok: false }`; else stays open. */
  onConfirm: () => unknown;
};

function refused(result: unknown): boolean {
  return typeof result === "object" && result !== null && "ok" in result && result.ok === false;
}

/** Asks once before what cannot be undone. The safe button has the focus. */
export function Confirm({
  trigger,
  title,
  children,
  confirmLabel,
  cancelLabel = "Keep it",
  confirmKind = "danger",
  onConfirm,
}: ConfirmProps) {
  const [open, setOpen] = useState(false);
  const [pending, setPending] = useState(false);

  async function confirm() {
    setPending(true);
    try {
      const result = await onConfirm();
      if (!refused(result)) setOpen(false);
    } finally {
      setPending(false);
    }
  }

  return (
    <AlertDialog.Root open={open} onOpenChange={setOpen}>
      <AlertDialog.Trigger asChild>{trigger}</AlertDialog.Trigger>
      <AlertDialog.Portal>
        <AlertDialog.Overlay className={overlayClass} />
        <AlertDialog.Content className={panelClass}>
          <AlertDialog.Title className="text-2xl">{title}</AlertDialog.Title>
          <AlertDialog.Description asChild>
            <div>{children}</div>
          </AlertDialog.Description>
          <div className="flex flex-wrap justify-end gap-3">
            <AlertDialog.Cancel asChild>
              <Button>{cancelLabel}</Button>
            </AlertDialog.Cancel>
            <PendingButton
              kind={confirmKind}
              pending={pending}
              onClick={() => {
                void confirm();
              }}
            >
              {confirmLabel}
            </PendingButton>
          </div>
        </AlertDialog.Content>
      </AlertDialog.Portal>
    </AlertDialog.Root>
  );
}
