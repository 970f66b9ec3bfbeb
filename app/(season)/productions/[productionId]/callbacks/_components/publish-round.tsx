"use client";

import { useQueryClient } from "@tanstack/react-query";
import { Button } from "@/components/ui/button";
import { Confirm } from "@/components/ui/confirm";
import { showToast } from "@/components/ui/toast-store";
import {
  callbacksQuery,
  previewInWords,
  whyNotYet,
  type Draft,
  type DraftRound,
} from "@/lib/client/callbacks";
import { orRefuse } from "@/lib/client/refusal";
import { publishRound } from "../actions";
import { whenInWords } from "./round-summary";

/** Sends the list, after saying what that will do. */
export function PublishRound({
  productionId,
  draft,
  round,
}: {
  productionId: string;
  draft: Draft;
  round: DraftRound;
}) {
  const client = useQueryClient();
  const why = whyNotYet(draft);
  const { preview } = draft;
  const again = round.issue > 0;
  const label = again ? "Publish the changes" : "Publish the list";
  if (!preview) return null;
  if (why !== null || (again && preview.told + preview.takenOff === 0)) {
    return (
      <span className="flex flex-wrap items-center gap-x-3 gap-y-1">
        <span id="why-not-published" className={why === null ? "sr-only" : "text-sm text-ink-2"}>
          {why ?? "Everything has gone out."}
        </span>
        <Button aria-disabled aria-describedby="why-not-published">
          {label}
        </Button>
      </span>
    );
  }

  async function publish() {
    try {
      const done = await orRefuse(
        publishRound({ productionId, roundId: round.id, version: round.version }),
      );
      showToast({ title: `Published. ${previewInWords(done)}` });
      return { ok: true };
    } catch (error) {
      showToast({ tone: "error", title: error instanceof Error ? error.message : String(error) });
      return { ok: false };
    } finally {
      await client.invalidateQueries({ queryKey: callbacksQuery(productionId).queryKey });
    }
  }

  return (
    <Confirm
      trigger={<Button kind="primary">{label}</Button>}
      title={again ? "Publish the changes?" : "Publish the list?"}
      confirmLabel="Publish"
      confirmKind="primary"
      cancelLabel="Not yet"
      onConfirm={publish}
    >
      <p className="font-bold">{previewInWords(preview)}</p>
      <p className="mt-2">
        {whenInWords(round)}, {round.room ?? "place to follow"}. Each person is told by e-mail what
        concerns them and nothing else, and answers on their own page. What is sent cannot be called
        back; a change can follow.
      </p>
    </Confirm>
  );
}
