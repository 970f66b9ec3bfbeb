"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { PendingButton } from "@/components/ui/pending-button";
import { showToast } from "@/components/ui/toast-store";
import { acknowledgeSheet } from "@/app/(me)/actions";

/** Opens the browser's own print dialog. */
export function PrintButton() {
  return (
    <Button kind="primary" onClick={() => window.print()}>
      Print
    </Button>
  );
}

/** For whoever the issue concerns: they have read it. */
export function AcknowledgeButton({ issueId }: { issueId: string }) {
  const router = useRouter();
  const [pending, setPending] = useState(false);
  async function acknowledge() {
    setPending(true);
    const result = await acknowledgeSheet({ issueId }).catch(() => null);
    setPending(false);
    showToast(
      result?.ok
        ? { title: "Noted: you have read it." }
        : {
            tone: "error",
            title: result?.error.message ?? "The server did not answer. Try again.",
          },
    );
    router.refresh();
  }
  return (
    <PendingButton pending={pending} onClick={() => void acknowledge()}>
      I have read it
    </PendingButton>
  );
}
