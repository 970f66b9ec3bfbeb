import type { Metadata } from "next";
import { PageTitle } from "@/components/layout/page-title";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { productionFor } from "@/lib/data/guard";
import { ImportSingers } from "./_components/import-singers";

export const metadata: Metadata = { title: "Import singers" };

/** A list of singers from a spreadsheet: seen row by row before anything is saved. */
export default async function ImportPage({
  params,
}: PageProps<"/productions/[productionId]/auditions/import">) {
  const { productionId } = await params;
  const actor = await pageActor(`/productions/${productionId}/auditions/import`);
  await orNotFound(productionFor(actor, productionId, "auditions:plan"));
  return (
    <>
      <PageTitle
        title="Import singers"
        sub="Choose a spreadsheet and see what each row becomes. Nothing is saved until you say so."
      />
      <ImportSingers productionId={productionId} />
    </>
  );
}
