"use client";

import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";

export default function CastingError({ retry }: { retry: () => void }) {
  return (
    <EmptyState
      level={1}
      title="The casting grid could not be shown"
      action={
        <Button kind="primary" onClick={retry}>
          Try again
        </Button>
      }
    >
      Something went wrong on our side. Choices already made are kept.
    </EmptyState>
  );
}
