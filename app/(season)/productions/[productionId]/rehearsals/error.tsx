"use client";

import { PageTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";

export default function RehearsalsError({ retry }: { error: unknown; retry: () => void }) {
  return (
    <PageTitle
      title="The calls could not be shown"
      sub="Something went wrong on our side. Nothing that was saved is lost."
      actions={
        <Button kind="primary" onClick={() => retry()}>
          Try again
        </Button>
      }
    />
  );
}
