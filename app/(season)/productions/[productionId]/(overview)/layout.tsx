import { redirect } from "next/navigation";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { productionFor } from "@/lib/data/guard";
import { can } from "@/lib/permissions/can";

/** Asks for permission outside the loading state. Who only sings or plays in a production has a page of their own. */
export default async function OverviewLayout({
  children,
  params,
}: LayoutProps<"/productions/[productionId]">) {
  const { productionId } = await params;
  const actor = await pageActor(`/productions/${productionId}`);
  const { id, companyId } = await orNotFound(productionFor(actor, productionId, "production:see"));
  if (!can(actor, "calls:read", { companyId, productionId: id })) redirect("/me");
  return children;
}
