"use client";

import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";

export default function SeasonError({ retry }: { retry: () => void }) {
  return (
    <EmptyState
      level={1}
      title="The season could not be shown"
      action={
        <Button kind="primary" onClick={() => retry()}>
          Try again
        </Button>
      }
    >
      Something went wrong on our side. Every call and every production is as it was.
    </EmptyState>
  );
}
