"use client";

import { useFormStatus } from "react-dom";
import { Button, type ButtonProps } from "./button";

export type PendingButtonProps = Omit<ButtonProps, "asChild"> & {
  /** Work in progress; without it, the form the button stands in tells. */
  pending?: boolean;
  /** Said while waiting, for instance "Saving". */
  pendingLabel?: string;
};

/**
 * A button that shows it is at work and takes no second press meanwhile. It stays focusable, so a
 * keyboard does not lose its place, and keeps its width, so nothing jumps.
 */
export function PendingButton({
  pending,
  pendingLabel = "Working",
  onClick,
  children,
  type,
  ...rest
}: PendingButtonProps) {
  const form = useFormStatus();
  const busy = pending ?? form.pending;
  return (
    <Button
      type={type ?? (onClick ? "button" : "submit")}
      aria-disabled={busy || undefined}
      onClick={(event) => {
        if (busy) event.preventDefault();
        else onClick?.(event);
      }}
      {...rest}
    >
      <span className="grid">
        <span className={busy ? "invisible col-start-1 row-start-1" : "col-start-1 row-start-1"}>
          {children}
        </span>
        <span className="col-start-1 row-start-1 flex items-center justify-center">
          {busy && (
            <>
              <span className="sr-only">{pendingLabel}</span>
              <span aria-hidden="true" className="animate-breathe tracking-[0.3em]">
                •••
              </span>
            </>
          )}
        </span>
      </span>
    </Button>
  );
}
