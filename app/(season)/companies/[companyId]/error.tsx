"use client";

import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";

export default function CompanyError({ retry }: { retry: () => void }) {
  return (
    <EmptyState
      level={1}
      title="This page could not be shown"
      action={
        <Button kind="primary" onClick={() => retry()}>
          Try again
        </Button>
      }
    >
      Something went wrong on our side. What was saved in this company is kept.
    </EmptyState>
  );
}
