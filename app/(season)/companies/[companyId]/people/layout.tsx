import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { companyFor } from "@/lib/data/guard";

/** Asks for permission outside the loading state, so that a refusal answers 404 before anything is sent. */
export default async function MembersLayout({
  children,
  params,
}: LayoutProps<"/companies/[companyId]/people">) {
  const { companyId } = await params;
  const actor = await pageActor(`/companies/${companyId}/people`);
  await orNotFound(companyFor(actor, companyId, "members:manage"));
  return children;
}
