"use client";

import { Button } from "@/components/ui/button";

export default function OwnPageError({ retry }: { error: unknown; retry: () => void }) {
  return (
    <>
      <h1 className="text-3xl">This could not be shown</h1>
      <p className="mt-2 mb-4 text-ink-2">
        What you have answered and told us is safe. Try again in a moment.
      </p>
      <Button kind="primary" size="large" onClick={() => retry()}>
        Try again
      </Button>
    </>
  );
}
