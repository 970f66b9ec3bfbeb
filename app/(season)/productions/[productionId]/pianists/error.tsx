"use client";

import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";

export default function PianistsError({ retry }: { error: unknown; retry: () => void }) {
  return (
    <EmptyState
      title="The pianists could not be shown"
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
