"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Notice } from "@/components/ui/notice";
import { PendingButton } from "@/components/ui/pending-button";
import { showToast } from "@/components/ui/toast-store";
import type { AuditionDayView } from "@/lib/auditions/day-view";
import { makeDoorLink, revokeDoorLink } from "../../actions";
import { LOST_CONNECTION } from "@/components/forms/lost-connection";
import { useRefreshDay } from "./use-refresh-day";

/** The monitor's link: made, copied once, and ended. */
export function DoorLink({ day }: { day: AuditionDayView }) {
  const refresh = useRefreshDay(day);
  const [link, setLink] = useState<string | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const [pending, setPending] = useState(false);
  const which = { productionId: day.productionId, dayId: day.id };

  async function act<T>(
    work: () => Promise<{ ok: true; data: T } | { ok: false; error: { message: string } }>,
    then: (data: T) => void,
  ) {
    setPending(true);
    setProblem(null);
    const result = await work().catch(() => null);
    setPending(false);
    if (!result?.ok) {
      setProblem(result ? result.error.message : LOST_CONNECTION);
      return;
    }
    then(result.data);
    await refresh();
  }

  return (
    <Dialog
      trigger={<Button>At the door</Button>}
      title="At the door"
      description="A link for the monitor’s phone: the running order with names and times, and nothing else about anyone. It works on this day only."
      onOpenChange={(open) => {
        if (!open) setLink(null);
      }}
    >
      {problem !== null && <Notice tone="error" title={problem} />}
      {link !== null && (
        <>
          <Field
            label="The monitor’s link"
            hint="Shown this once. Send it to the monitor, or copy it now."
          >
            <Input readOnly value={link} onFocus={(event) => event.currentTarget.select()} />
          </Field>
          <Button
            className="self-start"
            onClick={() => {
              void navigator.clipboard.writeText(link).then(
                () => showToast({ title: "The link is copied." }),
                () =>
                  setProblem(
                    "The browser did not allow copying: mark the link and copy it by hand.",
                  ),
              );
            }}
          >
            Copy the link
          </Button>
        </>
      )}
      {link === null && (
        <p className="text-sm text-ink-2">
          {day.doorLink ? "A link is out. Making a new one ends it at once." : "No link is out."}
        </p>
      )}
      <div className="flex flex-wrap justify-end gap-3">
        {day.doorLink && (
          <PendingButton
            kind="danger"
            pending={pending}
            onClick={() =>
              void act(
                () => revokeDoorLink(which),
                () => {
                  setLink(null);
                  showToast({ title: "The monitor’s link no longer works." });
                },
              )
            }
          >
            End the link
          </PendingButton>
        )}
        <PendingButton
          kind="primary"
          pending={pending}
          onClick={() =>
            void act(
              () => makeDoorLink(which),
              (data) => setLink(data.link),
            )
          }
        >
          {day.doorLink ? "Make a new link" : "Make the link"}
        </PendingButton>
      </div>
    </Dialog>
  );
}
