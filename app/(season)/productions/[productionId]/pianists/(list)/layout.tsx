import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { productionFor } from "@/lib/data/guard";

/** Asks for permission outside the loading state, so that a refusal answers 404 before anything is sent. */
export default async function PianistsLayout({
  children,
  params,
}: LayoutProps<"/productions/[productionId]/pianists">) {
  const { productionId } = await params;
  const actor = await pageActor(`/productions/${productionId}/pianists`);
  await orNotFound(productionFor(actor, productionId, "pianists:see"));
  return children;
}
