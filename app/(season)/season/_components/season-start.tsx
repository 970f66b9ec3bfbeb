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
        title="No production to look after yet"
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
          {hasOwnPage && "What you sing or play in is on your own page. "}
          To look after a production here, ask its music director or its company’s admin to invite{" "}
          <strong>{email}</strong>: it then appears on this page.
        </p>
      </EmptyState>
    </>
  );
}
