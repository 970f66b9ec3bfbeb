import Link from "next/link";
import { PageTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";

export default function RehearsalsNotFound() {
  return (
    <PageTitle
      title="This is not here"
      sub="It may have been removed, or it is not for your position in the production."
      actions={
        <Button asChild>
          <Link href="/season">Back to your season</Link>
        </Button>
      }
    />
  );
}
