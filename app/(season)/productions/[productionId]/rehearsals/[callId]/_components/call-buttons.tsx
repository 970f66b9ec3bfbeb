"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Confirm } from "@/components/ui/confirm";
import { Dialog, DialogClose } from "@/components/ui/dialog";
import { PendingButton } from "@/components/ui/pending-button";
import { showToast } from "@/components/ui/toast-store";
import { orRefuse } from "@/lib/client/refusal";
import { cancelCall, publishCall, refreshCall, restoreCall } from "../../actions";

type Props = {
  productionId: string;
  callId: string;
  version: number;
  state: "draft" | "published" | "cancelled";
  /** Whoever may not see the casting does not publish what would tell it. */
  mayPublish: boolean;
};

/** Publishes a call, cancels it (with the way back), or restores it. */
export function CallButtons({ productionId, callId, version, state, mayPublish }: Props) {
  const router = useRouter();
  const [pending, setPending] = useState(false);
  const [ask, setAsk] = useState<string[] | null>(null);
  const seen = { productionId, callId, version };

  async function run(work: () => Promise<void>) {
    setPending(true);
    try {
      await work();
      return { ok: true };
    } catch (error) {
      showToast({ tone: "error", title: error instanceof Error ? error.message : String(error) });
      return { ok: false };
    } finally {
      setPending(false);
      router.refresh();
    }
  }

  const publish = (despite: boolean) =>
    run(async () => {
      const answer = await orRefuse(publishCall({ ...seen, despite }));
      setAsk(answer.published ? null : answer.ask);
      if (answer.published) showToast({ title: "Published: the room and the pianist are taken." });
    });

  const cancel = () =>
    run(async () => {
      const { was, version: now } = await orRefuse(cancelCall(seen));
      showToast({
        title:
          was === "published"
            ? "Cancelled: the room and the pianist are free."
            : "The draft is cancelled.",
        undo: async () => {
          const to = mayPublish ? was : "draft";
          await run(async () => {
            await orRefuse(restoreCall({ ...seen, version: now, to }));
          });
        },
      });
    });

  if (state === "cancelled") {
    return (
      <PendingButton
        kind="primary"
        pending={pending}
        onClick={() =>
          void run(async () => {
            await orRefuse(restoreCall({ ...seen, to: "draft" }));
          })
        }
      >
        Restore as a draft
      </PendingButton>
    );
  }
  return (
    <>
      {state === "published" ? (
        <Confirm
          trigger={<Button kind="danger">Cancel the call</Button>}
          title="Cancel this call?"
          confirmLabel="Cancel the call"
          onConfirm={cancel}
        >
          <p>
            Its room and pianist become free. People learn of it with the next issue of the call
            sheet.{" "}
            {mayPublish
              ? "You can take it back while both are still free."
              : "You can take it back as a draft; the music director publishes it again."}
          </p>
        </Confirm>
      ) : (
        <>
          <PendingButton kind="quiet" pending={pending} onClick={() => void cancel()}>
            Cancel the draft
          </PendingButton>
          {mayPublish && (
            <PendingButton
              kind="primary"
              pending={pending}
              pendingLabel="Publishing"
              onClick={() => void publish(false)}
            >
              Publish the call
            </PendingButton>
          )}
        </>
      )}
      <Dialog
        title="Publish all the same?"
        description="These people are called and cannot all be there:"
        open={ask !== null}
        onOpenChange={(open) => {
          if (!open) setAsk(null);
        }}
      >
        <ul className="list-disc pl-5 text-sm">
          {(ask ?? []).map((words) => (
            <li key={words}>{words}</li>
          ))}
        </ul>
        <div className="flex flex-wrap justify-end gap-3">
          <DialogClose>
            <Button>Not yet</Button>
          </DialogClose>
          <PendingButton kind="primary" pending={pending} onClick={() => void publish(true)}>
            Publish all the same
          </PendingButton>
        </div>
      </Dialog>
    </>
  );
}

/** Calls whom the casting of today needs; changes by hand stay. */
export function BringUpToDate({
  productionId,
  callId,
  version,
}: Omit<Props, "state" | "mayPublish">) {
  const router = useRouter();
  const [pending, setPending] = useState(false);
  async function bring() {
    setPending(true);
    const result = await refreshCall({ productionId, callId, version }).catch(() => null);
    setPending(false);
    if (!result?.ok)
      showToast({
        tone: "error",
        title: result?.error.message ?? "The server did not answer. Try again.",
      });
    router.refresh();
  }
  return (
    <PendingButton size="small" pending={pending} onClick={() => void bring()}>
      Bring it up to date
    </PendingButton>
  );
}
