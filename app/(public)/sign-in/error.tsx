"use client";

import { Button } from "@/components/ui/button";

export default function SignInError({ retry }: { error: unknown; retry: () => void }) {
  return (
    <>
      <h1 className="text-3xl">This could not be shown</h1>
      <p className="text-ink-2">
        Nothing was lost, and nobody was signed in or out. Try again in a moment.
      </p>
      <Button kind="primary" size="large" className="self-start" onClick={() => retry()}>
        Try again
      </Button>
    </>
  );
}
