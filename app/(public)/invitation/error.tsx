"use client";

import { Button } from "@/components/ui/button";

export default function InvitationError({ retry }: { error: unknown; retry: () => void }) {
  return (
    <>
      <h1 className="text-3xl">This could not be shown</h1>
      <p className="text-ink-2">Your invitation is as it was. Try again in a moment.</p>
      <Button kind="primary" size="large" className="self-start" onClick={() => retry()}>
        Try again
      </Button>
    </>
  );
}
