import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { readCompany } from "@/lib/data/companies";
import { SeasonFrame } from "../../_components/season-frame";

/** The frame of a company: only the keys this person may press. Each page asks permission for itself. */
export default async function CompanyLayout({
  children,
  params,
}: LayoutProps<"/companies/[companyId]">) {
  const { companyId } = await params;
  const actor = await pageActor(`/companies/${companyId}`);
  const company = await orNotFound(readCompany(actor, companyId));
  return (
    <SeasonFrame
      actor={actor}
      company={company}
      crumbs={[{ label: company.name, href: `/companies/${company.id}` }]}
    >
      {children}
    </SeasonFrame>
  );
}
