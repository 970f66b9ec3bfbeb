import Link from "next/link";
import { PageTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";

/** For someone whom no company knows yet. */
export function NothingYet({ email }: { email: string }) {
  return (
    <>
      <PageTitle title="My page" />
      <EmptyState
        title="No company yet"
        action={
          <Button asChild kind="primary" size="large">
            <Link href={"/companies/new"}>Start a company</Link>
          </Button>
        }
      >
        <p>
          Your auditions, callbacks, calls and sessions stand here once a company has invited you.
          Ask it to invite <strong className="break-all text-ink">{email}</strong>: the invitation
          then appears on this page, too.
        </p>
        <p className="mt-2">
          Running the music of a season yourself? Start a company, and its first production after
          that.
        </p>
      </EmptyState>
    </>
  );
}
