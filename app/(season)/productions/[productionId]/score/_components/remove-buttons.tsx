"use client";

import { useState } from "react";
import { PendingButton } from "@/components/ui/pending-button";
import { showToast } from "@/components/ui/toast-store";
import type { ActionResult } from "@/lib/errors";
import { removeNumber, removeRole, restoreNumber, restoreRole } from "../actions";
import { tell } from "./tell";

type Act = () => Promise<ActionResult<unknown>>;

/** Removes at once, with the way back in the message. */
function RemoveButton({
  children,
  name,
  remove,
  restore,
}: {
  children: string;
  name: string;
  remove: Act;
  restore: Act;
}) {
  const [pending, setPending] = useState(false);
  return (
    <PendingButton
      kind="danger"
      pending={pending}
      pendingLabel="Removing"
      onClick={() => {
        setPending(true);
        void tell(remove()).then((done) => {
          setPending(false);
          if (done) {
            showToast({
              title: `${name} removed.`,
              undo: async () => {
                if (await tell(restore())) showToast({ title: `${name} is back.` });
              },
            });
          }
        });
      }}
    >
      {children}
    </PendingButton>
  );
}

export function RemoveNumberButton({
  productionId,
  numberId,
  name,
}: {
  productionId: string;
  numberId: string;
  name: string;
}) {
  const which = { productionId, numberId };
  return (
    <RemoveButton
      name={`Number ${name}`}
      remove={() => removeNumber(which)}
      restore={() => restoreNumber(which)}
    >
      Remove the number
    </RemoveButton>
  );
}

export function RemoveRoleButton({
  productionId,
  roleId,
  name,
}: {
  productionId: string;
  roleId: string;
  name: string;
}) {
  const which = { productionId, roleId };
  return (
    <RemoveButton name={name} remove={() => removeRole(which)} restore={() => restoreRole(which)}>
      Remove the role
    </RemoveButton>
  );
}
