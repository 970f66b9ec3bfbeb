"use client";

import { unstable_rethrow } from "next/navigation";
import { useTransition } from "react";
import { LOST_CONNECTION } from "@/components/forms/lost-connection";
import { PendingButton } from "@/components/ui/pending-button";
import { showToast } from "@/components/ui/toast-store";
import type { ActionResult } from "@/lib/errors";

export type ActButtonProps = {
  label: string;
  /** What a screen reader says, where the label alone does not tell which one; begins with the label. */
  spoken?: string;
  act: () => Promise<ActionResult<unknown>>;
  /** Said when it is done. */
  said: string;
};

/** A small act on one row: pressed, done, said. */
export function ActButton({ label, spoken, act, said }: ActButtonProps) {
  const [pending, startTransition] = useTransition();
  return (
    <PendingButton
      type="button"
      size="small"
      pending={pending}
      {...(spoken !== undefined && { "aria-label": spoken })}
      onClick={() => {
        startTransition(async () => {
          try {
            const result = await act();
            showToast(result.ok ? { title: said } : { title: result.error.message, tone: "error" });
          } catch (error) {
            unstable_rethrow(error);
            showToast({ title: LOST_CONNECTION, tone: "error" });
          }
        });
      }}
    >
      {label}
    </PendingButton>
  );
}
