"use client";

import { useEffect, useState } from "react";
import { Button } from "@/components/ui/button";
import { Checkbox } from "@/components/ui/checkbox";
import { Dialog } from "@/components/ui/dialog";
import { Notice } from "@/components/ui/notice";
import { PendingButton } from "@/components/ui/pending-button";
import { SkeletonRows } from "@/components/ui/skeleton";
import { showToast } from "@/components/ui/toast-store";
import type { AuditionDayView } from "@/lib/auditions/day-view";
import type { InvitationPreview } from "@/lib/data/auditions/invite";
import { inviteSingers, previewInvitations } from "../../actions";
import { LOST_CONNECTION } from "@/components/forms/lost-connection";
import { useRefreshDay } from "./use-refresh-day";

const singers = (n: number): string => (n === 1 ? "1 singer" : `${String(n)} singers`);

/** Who would be written to, and what they will read, before anything is sent. */
export function InviteDialog({ day, onClose }: { day: AuditionDayView; onClose: () => void }) {
  const refresh = useRefreshDay(day);
  const [preview, setPreview] = useState<InvitationPreview | null>(null);
  const [left, setLeft] = useState<ReadonlySet<string>>(new Set());
  const [problem, setProblem] = useState<string | null>(null);
  const [pending, setPending] = useState(false);
  const { productionId, id: dayId } = day;

  useEffect(() => {
    let gone = false;
    void previewInvitations({ productionId, dayId, signUpIds: null })
      .catch(() => null)
      .then((result) => {
        if (gone) return;
        if (result?.ok) setPreview(result.data);
        else setProblem(result ? result.error.message : LOST_CONNECTION);
      });
    return () => {
      gone = true;
    };
  }, [productionId, dayId]);

  const chosen = preview?.recipients.filter((singer) => !left.has(singer.signUpId)) ?? [];

  async function send() {
    setPending(true);
    setProblem(null);
    const result = await inviteSingers({
      productionId,
      dayId,
      signUpIds: chosen.map((singer) => singer.signUpId),
    }).catch(() => null);
    setPending(false);
    if (!result?.ok) {
      setProblem(result ? result.error.message : LOST_CONNECTION);
      return;
    }
    showToast({ title: `${singers(result.data.invited)} invited.` });
    onClose();
    await refresh();
  }

  return (
    <Dialog
      open
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
      title="Invite to these times"
      description="Each singer placed on this day gets one message with their own time and link. Nobody is invited twice."
    >
      {!preview && problem === null && (
        <SkeletonRows rows={4} label="Reading who is to be invited" />
      )}
      {problem !== null && <Notice tone="error" title={problem} />}
      {preview && preview.recipients.length === 0 && (
        <p>Everyone placed on this day is invited already. Place more singers first.</p>
      )}
      {preview && preview.withoutAddress.length > 0 && (
        <Notice tone="caution" title={`No e-mail address: ${preview.withoutAddress.join(", ")}.`}>
          Tell them yourself.
        </Notice>
      )}
      {preview && preview.recipients.length > 0 && (
        <>
          <fieldset className="max-h-56 overflow-y-auto border-y border-rule py-1">
            <legend className="sr-only">Who is invited</legend>
            {preview.recipients.map((singer) => (
              <Checkbox
                key={singer.signUpId}
                label={`${singer.name}, ${singer.when}`}
                checked={!left.has(singer.signUpId)}
                onChange={(event) => {
                  const next = new Set(left);
                  if (event.currentTarget.checked) next.delete(singer.signUpId);
                  else next.add(singer.signUpId);
                  setLeft(next);
                }}
              />
            ))}
          </fieldset>
          {preview.message && (
            <section
              aria-label="What they read"
              className="rounded-sm border border-rule bg-paper p-3 text-sm"
            >
              <p className="font-bold">{preview.message.subject}</p>
              <p className="mt-2 whitespace-pre-line">{preview.message.text}</p>
            </section>
          )}
          <div className="flex flex-wrap justify-end gap-3">
            <Button onClick={onClose}>Not now</Button>
            <PendingButton
              kind="primary"
              pending={pending}
              disabled={chosen.length === 0}
              onClick={() => void send()}
            >
              {`Invite ${singers(chosen.length)}`}
            </PendingButton>
          </div>
        </>
      )}
    </Dialog>
  );
}
