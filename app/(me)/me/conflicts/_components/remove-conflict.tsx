"use client";

import { useTransition } from "react";
import { removeConflicts, restoreConflicts } from "@/app/(me)/actions";
import { LOST_CONNECTION } from "@/components/forms/lost-connection";
import { PendingButton } from "@/components/ui/pending-button";
import { showToast } from "@/components/ui/toast-store";
import type { ActionResult } from "@/lib/errors";

async function say(
  act: () => Promise<ActionResult<unknown>>,
  done: { title: string; undo?: () => Promise<void> },
): Promise<void> {
  try {
    const result = await act();
    showToast(result.ok ? done : { title: result.error.message, tone: "error" });
  } catch {
    showToast({ title: LOST_CONNECTION, tone: "error" });
  }
}

/** Takes a date back at once; the toast puts it back. */
export function RemoveConflict({ conflictIds, words }: { conflictIds: string[]; words: string }) {
  const [pending, startTransition] = useTransition();
  return (
    <PendingButton
      type="button"
      size="small"
      pending={pending}
      pendingLabel="Taking it back"
      aria-label={`Take back ${words}`}
      onClick={() => {
        startTransition(() =>
          say(() => removeConflicts({ conflictIds }), {
            title: `Taken back: ${words}.`,
            undo: () =>
              say(() => restoreConflicts({ conflictIds }), { title: `Back again: ${words}.` }),
          }),
        );
      }}
    >
      Take back
    </PendingButton>
  );
}
