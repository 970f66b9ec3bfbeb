"use client";

import { Button } from "@/components/ui/button";
import { Confirm } from "@/components/ui/confirm";
import { removeLine } from "../actions";
import { tell } from "./tell";

type Props = { productionId: string; lineId: string; role: string; number: string };

/** Removes a line after asking once. */
export function RemoveLineButton({ productionId, lineId, role, number }: Props) {
  return (
    <Confirm
      trigger={
        <Button kind="danger" size="small">
          Remove the line
        </Button>
      }
      title="Remove this line?"
      confirmLabel="Remove the line"
      onConfirm={async () => ({ ok: await tell(removeLine({ productionId, lineId })) })}
    >
      {role} will not sing in {number} any more. It does not come back by itself: a score can be
      read again, or the line typed in.
    </Confirm>
  );
}
