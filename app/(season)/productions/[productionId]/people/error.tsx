"use client";

import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";

export default function PeopleError({ retry }: { retry: () => void }) {
  return (
    <EmptyState
      level={1}
      title="The people could not be shown"
      action={
        <Button kind="primary" onClick={() => retry()}>
          Try again
        </Button>
      }
    >
      Something went wrong on our side. Positions and invitations are as they were.
    </EmptyState>
  );
}
