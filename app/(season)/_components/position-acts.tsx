"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { PendingButton } from "@/components/ui/pending-button";
import { showToast } from "@/components/ui/toast-store";
import { VisuallyHidden } from "@/components/ui/visually-hidden";
import type { PersonListed } from "@/lib/data/people";
import type { ActionResult } from "@/lib/errors";
import { POSITION_NAMES } from "@/lib/permissions/position-kinds";
import type { Into, Invite } from "./invite-person";

export type ChangePosition = (input: { positionId: string }) => Promise<ActionResult<void>>;

const LOST = "Nothing was changed: check the connection and press again.";

/** Ends one position, with the way back, and sends an invitation again to who has not come yet. */
export function PositionActs({
  person,
  into,
  invite,
  end,
  reopen,
}: {
  person: PersonListed;
  into: Into;
  invite: Invite;
  end: ChangePosition;
  reopen: ChangePosition;
}) {
  const router = useRouter();
  const [pending, setPending] = useState<"invite" | "end" | null>(null);
  const position = POSITION_NAMES[person.kind].toLowerCase();
  const { positionId } = person;

  async function run<T>(
    work: () => Promise<ActionResult<T>>,
    done: { title: string; undo?: () => Promise<void> },
  ) {
    const result = await work().catch(() => null);
    if (result?.ok) showToast(done);
    else showToast({ title: result?.error.message ?? LOST, tone: "error" });
    router.refresh();
  }

  async function press(which: "invite" | "end", work: () => Promise<void>) {
    setPending(which);
    try {
      await work();
    } finally {
      setPending(null);
    }
  }

  const takeBack = () =>
    run(() => reopen({ positionId }), { title: `${person.name} is ${position} again.` });

  return (
    <div className="flex flex-wrap gap-x-2 md:justify-end">
      {person.standing !== "joined" && person.email !== null && (
        <PendingButton
          kind="quiet"
          size="small"
          pending={pending === "invite"}
          onClick={() =>
            void press("invite", () =>
              run(
                () =>
                  invite({
                    ...into,
                    name: person.name,
                    email: person.email ?? "",
                    phone: person.phone,
                    kind: person.kind,
                  }),
                { title: `The invitation to ${person.name} is on its way.` },
              ),
            )
          }
        >
          {person.standing === "invited" ? "Invite again" : "Invite"}
          <VisuallyHidden> {person.name}</VisuallyHidden>
        </PendingButton>
      )}
      <PendingButton
        kind="quiet"
        size="small"
        pending={pending === "end"}
        onClick={() =>
          void press("end", () =>
            run(() => end({ positionId }), {
              title: `${person.name} is no longer ${position}.`,
              undo: takeBack,
            }),
          )
        }
      >
        End
        <VisuallyHidden>
          {" "}
          the position of {person.name}, {position}
        </VisuallyHidden>
      </PendingButton>
    </div>
  );
}
