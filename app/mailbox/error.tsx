"use client";

import { Button } from "@/components/ui/button";

export default function MailboxError({ retry }: { error: unknown; retry: () => void }) {
  return (
    <>
      <h1 className="text-3xl">The mailbox could not be read</h1>
      <p className="mt-2 mb-4 text-ink-2">The messages are still there. Try again in a moment.</p>
      <Button kind="primary" onClick={() => retry()}>
        Try again
      </Button>
    </>
  );
}
