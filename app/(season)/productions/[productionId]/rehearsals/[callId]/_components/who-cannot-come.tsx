"use client";

import { useQuery, useQueryClient } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { SectionTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { Chip } from "@/components/ui/chip";
import { Notice } from "@/components/ui/notice";
import { showToast } from "@/components/ui/toast-store";
import { applyRemedy } from "@/lib/calls/apply-remedy";
import type { ClashInWords, Remedy } from "@/lib/calls/types";
import { callClashesQuery } from "@/lib/client/calls";
import { orRefuse } from "@/lib/client/refusal";
import type { CallClashes } from "@/lib/data/calls/read";
import { changeCall, decideConflict } from "../../actions";
import type { CallFields } from "../../_components/call-fields";
import { ClashList } from "../../_components/clash-list";

type Props = {
  productionId: string;
  callId: string;
  version: number;
  /** The call as its form has it, so that a remedy can be taken here; null when nothing can be changed. */
  fields: CallFields | null;
  initial: CallClashes;
};

/** Who can't come and what to do: one press takes it, or agrees to the conflict or declines it. */
export function WhoCannotCome({ productionId, callId, version, fields, initial }: Props) {
  const router = useRouter();
  const client = useQueryClient();
  const query = callClashesQuery(productionId, callId);
  const { data, error } = useQuery({ ...query, initialData: initial });
  const [busy, setBusy] = useState(false);

  async function run(work: () => Promise<void>) {
    if (busy) return;
    setBusy(true);
    try {
      await work();
    } catch (refused) {
      showToast({
        tone: "error",
        title: refused instanceof Error ? refused.message : String(refused),
      });
    } finally {
      setBusy(false);
      await client.invalidateQueries({ queryKey: query.queryKey });
      router.refresh();
    }
  }

  const take = (remedy: Remedy) =>
    void run(async () => {
      if (!fields) return;
      const next = applyRemedy<CallFields["blocks"][number], CallFields>(fields, remedy);
      await orRefuse(changeCall({ ...next, callId, version }));
      showToast({ title: `Done: ${remedy.label}.` });
    });

  const decide = (conflictId: string, state: "agreed" | "declined") =>
    void run(async () => {
      const { was } = await orRefuse(decideConflict({ productionId, conflictId, state }));
      showToast({
        title: state === "agreed" ? "Agreed: they are away then." : "Declined: they are expected.",
        undo: () =>
          run(async () => {
            await orRefuse(decideConflict({ productionId, conflictId, state: was }));
          }),
      });
    });

  const decisions = ({ conflict, words }: ClashInWords) =>
    conflict?.state === "asked" ? (
      <>
        <Button
          size="small"
          aria-label={`Agree to the conflict: ${words}`}
          onClick={() => decide(conflict.id, "agreed")}
        >
          Agree
        </Button>
        <Button
          size="small"
          aria-label={`Decline the conflict: ${words}`}
          onClick={() => decide(conflict.id, "declined")}
        >
          Decline
        </Button>
      </>
    ) : null;

  return (
    <section aria-labelledby="who-cannot-come" aria-busy={busy}>
      <SectionTitle id="who-cannot-come">Who can’t come</SectionTitle>
      {error && <Notice tone="caution" title={error.message} />}
      {data.clashes.length === 0 && data.around.length === 0 && (
        <p className="text-sm">
          <Chip tone="fits">None</Chip> Everyone called, the room and the pianist are free.
        </p>
      )}
      {data.clashes.length > 0 && (
        <ClashList clashes={data.clashes} onTake={fields ? take : undefined} more={decisions} />
      )}
      {data.around.length > 0 && (
        <ul className="text-sm">
          {data.around.map((words) => (
            <li key={words} className="border-b border-rule py-3">
              <Chip tone="fits">Fits</Chip> {words}
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}
