import { EmptyState } from "@/components/ui/empty-state";
import Link from "next/link";
import { Button } from "@/components/ui/button";

export default function AuditionsNotFound() {
  return (
    <EmptyState
      level={1}
      title="That is not here"
      action={
        <Button asChild>
          <Link href="/season">To the season</Link>
        </Button>
      }
    >
      The day or list may have been removed, or the link is not for you.
    </EmptyState>
  );
}
