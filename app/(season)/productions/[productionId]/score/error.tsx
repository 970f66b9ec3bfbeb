"use client";

import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";

export default function ScoreError({ retry }: { retry: () => void }) {
  return (
    <EmptyState
      level={1}
      title="The score could not be shown"
      action={
        <Button kind="primary" onClick={retry}>
          Try again
        </Button>
      }
    >
      Something went wrong on our side. Numbers, roles and lines are kept.
    </EmptyState>
  );
}
