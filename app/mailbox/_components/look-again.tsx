"use client";

import { useRouter } from "next/navigation";
import { useTransition } from "react";
import { PendingButton } from "@/components/ui/pending-button";

export function LookAgain() {
  const router = useRouter();
  const [pending, startTransition] = useTransition();
  return (
    <PendingButton
      type="button"
      pending={pending}
      pendingLabel="Looking"
      onClick={() => startTransition(() => router.refresh())}
    >
      Look again
    </PendingButton>
  );
}
