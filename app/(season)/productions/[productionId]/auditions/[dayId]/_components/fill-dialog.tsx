"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Notice } from "@/components/ui/notice";
import { PendingButton } from "@/components/ui/pending-button";
import { showToast } from "@/components/ui/toast-store";
import type { AuditionDayView } from "@/lib/auditions/day-view";
import type { FillProposal } from "@/lib/data/auditions/fill";
import { acceptFill, proposeFill } from "../../actions";
import { LOST_CONNECTION } from "@/components/forms/lost-connection";
import { useRefreshDay } from "./use-refresh-day";

const singers = (n: number): string => (n === 1 ? "1 singer" : `${String(n)} singers`);

/** Proposes a slot for everyone who waits; nothing is written until the proposal is accepted. */
export function PlaceEveryone({ day }: { day: AuditionDayView }) {
  const refresh = useRefreshDay(day);
  const [proposal, setProposal] = useState<FillProposal | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const [pending, setPending] = useState(false);
  const which = { productionId: day.productionId, dayId: day.id };

  async function propose() {
    setPending(true);
    setProblem(null);
    const result = await proposeFill(which).catch(() => null);
    setPending(false);
    if (result?.ok) setProposal(result.data);
    else showToast({ title: result ? result.error.message : LOST_CONNECTION, tone: "error" });
  }

  async function accept(placements: FillProposal["placements"]) {
    setPending(true);
    setProblem(null);
    const result = await acceptFill({
      ...which,
      placements: placements.map(({ signUpId, slotId }) => ({ signUpId, slotId })),
    }).catch(() => null);
    setPending(false);
    if (!result?.ok) {
      setProblem(result ? result.error.message : LOST_CONNECTION);
      return;
    }
    showToast({ title: `${singers(result.data.placed)} placed.` });
    setProposal(null);
    await refresh();
  }

  return (
    <>
      <PendingButton
        pending={pending && proposal === null}
        disabled={day.waiting.length === 0}
        onClick={() => void propose()}
      >
        Place everyone
      </PendingButton>
      {proposal && (
        <Dialog
          open
          onOpenChange={(open) => {
            if (!open) setProposal(null);
          }}
          title={
            proposal.unplaced.length === 0
              ? `All ${singers(proposal.placements.length)} fit`
              : `${String(proposal.placements.length)} of ${singers(proposal.placements.length + proposal.unplaced.length)} fit`
          }
          description="No plan for the free slots of this day places more. Everyone stays within the times they asked for; held slots stay free."
        >
          {problem !== null && <Notice tone="error" title={problem} />}
          {proposal.unplaced.length > 0 && (
            <section aria-label="Without a time">
              <h3 className="text-xl">Without a time</h3>
              <ul className="border-t border-rule">
                {proposal.unplaced.map((singer) => (
                  <li key={singer.signUpId} className="border-b border-rule py-2">
                    <strong>{singer.name}</strong>. {singer.why}
                  </li>
                ))}
              </ul>
            </section>
          )}
          {proposal.placements.length > 0 && (
            <section aria-label="Proposed times">
              <h3 className="text-xl">Proposed times</h3>
              <ul className="max-h-64 overflow-y-auto border-t border-rule">
                {proposal.placements.map((singer) => (
                  <li key={singer.signUpId} className="flex gap-3 border-b border-rule py-1.5">
                    <strong>{singer.time}</strong>
                    <span className="min-w-0 flex-1">{singer.name}</span>
                    <span className="text-ink-2">{singer.room}</span>
                  </li>
                ))}
              </ul>
            </section>
          )}
          <div className="flex flex-wrap justify-end gap-3">
            <Button onClick={() => setProposal(null)}>Leave the day as it is</Button>
            {problem !== null && <Button onClick={() => void propose()}>Propose again</Button>}
            <PendingButton
              kind="primary"
              pending={pending}
              disabled={proposal.placements.length === 0}
              onClick={() => void accept(proposal.placements)}
            >
              {`Place ${singers(proposal.placements.length)}`}
            </PendingButton>
          </div>
        </Dialog>
      )}
    </>
  );
}
