"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { callbacksQuery } from "@/lib/client/callbacks";
import { StartRound } from "./start-round";

/** Once a round has gone out, another may begin. */
export default function NextRound({ productionId }: { productionId: string }) {
  const client = useQueryClient();
  const [open, setOpen] = useState(false);
  return (
    <Dialog
      open={open}
      onOpenChange={setOpen}
      trigger={
        <Button kind="quiet" size="small" className="-ml-3 self-start">
          Begin another round
        </Button>
      }
      title="Begin another round"
      description="It starts with nobody ticked. The last round stays as it is with those it was sent to."
    >
      <StartRound
        productionId={productionId}
        title="Second callbacks"
        onDone={async () => {
          await client.invalidateQueries({ queryKey: callbacksQuery(productionId).queryKey });
          setOpen(false);
        }}
      />
    </Dialog>
  );
}
