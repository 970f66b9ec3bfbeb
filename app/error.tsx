"use client";

import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";

export default function PageError({ retry }: { retry: () => void }) {
  return (
    <main className="mx-auto w-full max-w-3xl px-4 py-12 md:px-8">
      <EmptyState
        level={1}
        title="This page could not be shown"
        action={
          <Button kind="primary" onClick={() => retry()}>
            Try again
          </Button>
        }
      >
        Something went wrong on our side. What was saved is kept. Try again in a moment; if it stays
        like this, tell whoever looks after your installation what you were doing.
      </EmptyState>
    </main>
  );
}
