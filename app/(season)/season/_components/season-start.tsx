import Link from "next/link";
import { PageTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";

/** The season of someone who runs no production: what could be here, and the ways there. */
export function SeasonStart({
  email,
  hasOwnPage,
  canCreate,
}: {
  email: string;
  /** Sings or plays somewhere. */
  hasOwnPage: boolean;
  canCreate: boolean;
}) {
  return (
    <>
      <PageTitle title="Your season" />
      <EmptyState
        title="No production yet"
        action={
          <>
            {canCreate ? (
              <Button asChild kind="primary">
                <Link href="/productions/new">Make the first production</Link>
              </Button>
            ) : (
              <Button asChild kind={hasOwnPage ? "secondary" : "primary"}>
                <Link href="/companies/new">Start a company</Link>
              </Button>
            )}
            {hasOwnPage && (
              <Button asChild kind="primary">
                <Link href="/me">Go to my page</Link>
              </Button>
            )}
          </>
        }
      >
        <p>
          The productions whose music or calls you look after stand here as staves, a bar to the
          week, with what clashes circled.
        </p>
        <p className="mt-3">
          {hasOwnPage
            ? "What you sing or play in is on your own page. "
            : "Do you work for a company that is here already? "}
          Ask for an invitation: its music director or admin sends it to <strong>{email}</strong>,
          and its productions appear here.
        </p>
      </EmptyState>
    </>
  );
}
