import type { Metadata } from "next";
import Link from "next/link";
import { PageTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { pageActor } from "@/lib/auth/get-actor";
import { listCompaniesToCreateIn } from "@/lib/data/productions";
import { NewProductionForm } from "./_components/new-production-form";

export const metadata: Metadata = { title: "New production" };

export default async function NewProductionPage({ searchParams }: PageProps<"/productions/new">) {
  const { company } = await searchParams;
  const actor = await pageActor("/productions/new");
  const companies = await listCompaniesToCreateIn(actor);
  const wanted = companies.find(({ id }) => id === company) ?? companies[0];
  if (!wanted) {
    return (
      <>
        <PageTitle title="New production" />
        <EmptyState
          title="A production belongs to a company"
          action={
            <Button asChild kind="primary">
              <Link href="/companies/new">Start a company</Link>
            </Button>
          }
        >
          You are not yet music director or admin of one. Start a company of your own, or ask the
          company’s admin to invite you as its music director.
        </EmptyState>
      </>
    );
  }
  return (
    <>
      <PageTitle
        title="New production"
        sub={
          companies.length === 1
            ? `At ${wanted.name}. You become its music director; the score comes next.`
            : "You become its music director; the score comes next."
        }
      />
      <NewProductionForm companies={companies} companyId={wanted.id} />
    </>
  );
}
