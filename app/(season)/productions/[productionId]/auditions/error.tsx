"use client";

import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";

export default function AuditionsError({ retry }: { error: unknown; retry: () => void }) {
  return (
    <EmptyState
      level={1}
      title="The auditions could not be shown"
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
