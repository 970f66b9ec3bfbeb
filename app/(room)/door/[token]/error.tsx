"use client";

import { Button } from "@/components/ui/button";
import { DoorFrame } from "./_components/door-frame";

export default function DoorError({ retry }: { error: unknown; retry: () => void }) {
  return (
    <DoorFrame note="">
      <h1 className="text-2xl">The running order could not be shown</h1>
      <p className="mt-2 mb-4 text-ink-2">
        Use the printed running order meanwhile, and try again in a moment.
      </p>
      <Button kind="primary" size="large" onClick={() => retry()}>
        Try again
      </Button>
    </DoorFrame>
  );
}
