import { notFound } from "next/navigation";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { readCompany } from "@/lib/data/companies";

/** Asks for permission outside the loading state, so that a refusal answers 404 before anything is sent. */
export default async function TrailLayout({
  children,
  params,
}: LayoutProps<"/companies/[companyId]/trail">) {
  const { companyId } = await params;
  const actor = await pageActor(`/companies/${companyId}/trail`);
  const { may } = await orNotFound(readCompany(actor, companyId));
  if (!may.trail) notFound();
  return children;
}
