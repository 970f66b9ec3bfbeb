import type { Metadata } from "next";
import Link from "next/link";
import { PageTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { pageActor } from "@/lib/auth/get-actor";
import { listCompaniesRun } from "@/lib/data/companies";

export const metadata: Metadata = { title: "Companies" };

/** The companies someone works for, each with the parts of it that are theirs to open. */
export default async function CompaniesPage() {
  const actor = await pageActor("/companies");
  const companies = await listCompaniesRun(actor);
  const start = (
    <Button asChild kind="primary">
      <Link href="/companies/new">Start a company</Link>
    </Button>
  );
  if (companies.length === 0) {
    return (
      <>
        <PageTitle title="Companies" />
        <EmptyState title="No company yet" action={start}>
          A company has its people, rooms and productions. Start one of your own, or ask one that is
          here to invite {actor.email}.
        </EmptyState>
      </>
    );
  }
  return (
    <>
      <PageTitle
        title="Companies"
        sub="Each keeps its people, rooms and productions to itself; your season shows you all of them together."
        actions={start}
      />
      <ul className="border-t border-rule">
        {companies.map(({ id, name, zone, may }) => (
          <li
            key={id}
            className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 border-b border-rule py-4"
          >
            <div>
              <h2 className="text-2xl">
                <Link
                  href={`/companies/${id}`}
                  className="inline-block py-0.5 text-ink no-underline hover:underline"
                >
                  {name}
                </Link>
              </h2>
              <p className="text-sm text-ink-2">Times of {zone.replaceAll("_", " ")}</p>
            </div>
            <p className="flex flex-wrap gap-x-5">
              {may.members && (
                <Link href={`/companies/${id}/people`} className="row-link">
                  People
                </Link>
              )}
              {may.rooms && (
                <Link href={`/companies/${id}/rooms`} className="row-link">
                  Rooms
                </Link>
              )}
              {may.trail && (
                <Link href={`/companies/${id}/trail`} className="row-link">
                  Trail
                </Link>
              )}
            </p>
          </li>
        ))}
      </ul>
    </>
  );
}
