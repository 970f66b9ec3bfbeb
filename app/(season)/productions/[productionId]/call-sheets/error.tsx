"use client";

import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";

export default function CallSheetsError({ retry }: { error: unknown; retry: () => void }) {
  return (
    <EmptyState
      title="The call sheets could not be shown"
      action={
        <Button kind="primary" onClick={() => retry()}>
          Try again
        </Button>
      }
    >
      Something went wrong on our side. Nothing that was saved is lost.
    </EmptyState>
  );
}
