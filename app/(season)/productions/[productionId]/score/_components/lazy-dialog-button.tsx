"use client";

import { Suspense, useState } from "react";
import type { ReactElement, ReactNode } from "react";
import { Button } from "@/components/ui/button";
import type { ButtonKind } from "@/components/ui/button";

export type LazyDialogProps = {
  trigger: ReactElement;
  open: boolean;
  onOpenChange: (open: boolean) => void;
};

type Props = {
  children: ReactNode;
  kind?: ButtonKind;
  /** Fetches the dialog's code; called when a hand or the focus comes near. */
  load: () => Promise<unknown>;
  /** Draws the lazy dialog around its trigger, so that focus comes back to it. */
  dialog: (props: LazyDialogProps) => ReactElement;
};

/** A button whose dialog, with its form and rules, is fetched only when somebody is about to open it. */
export function LazyDialogButton({ children, kind = "secondary", load, dialog }: Props) {
  const [wanted, setWanted] = useState(false);
  const [open, setOpen] = useState(false);
  const button = (
    <Button
      kind={kind}
      onPointerEnter={() => void load()}
      onFocus={() => void load()}
      {...(!wanted && {
        onClick: () => {
          setWanted(true);
          setOpen(true);
        },
      })}
    >
      {children}
    </Button>
  );
  if (!wanted) return button;
  return (
    <Suspense fallback={button}>
      {dialog({ trigger: button, open, onOpenChange: setOpen })}
    </Suspense>
  );
}
