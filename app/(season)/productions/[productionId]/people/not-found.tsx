import Link from "next/link";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";

export default function PeopleNotFound() {
  return (
    <EmptyState
      level={1}
      title="This is not here"
      action={
        <Button asChild>
          <Link href="/season">Back to your season</Link>
        </Button>
      }
    >
      It may have been removed, or it is not for your position in the production.
    </EmptyState>
  );
}
