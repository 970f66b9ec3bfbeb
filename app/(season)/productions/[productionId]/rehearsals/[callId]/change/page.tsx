import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { PageTitle } from "@/components/layout/page-title";
import { Notice } from "@/components/ui/notice";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { readCallChoices } from "@/lib/data/calls/choices";
import { readCallDraft } from "@/lib/data/calls/read";
import { callAddressSchema } from "@/lib/schemas/calls";
import { fieldsOf } from "../../_components/call-fields";
import { ChangeCallForm } from "../../_components/call-form";

export const metadata: Metadata = { title: "Change the call" };

/** Changes a call that is there already. */
export default async function ChangeCallPage({
  params,
}: PageProps<"/productions/[productionId]/rehearsals/[callId]/change">) {
  const address = callAddressSchema.safeParse(await params);
  if (!address.success) notFound();
  const { productionId, callId } = address.data;
  const actor = await pageActor(`/productions/${productionId}/rehearsals/${callId}/change`);
  const [choices, { draft, version, state }] = await orNotFound(
    Promise.all([readCallChoices(actor, productionId), readCallDraft(actor, address.data)]),
  );
  const published = state === "published";
  return (
    <>
      <PageTitle
        title="Change the call"
        sub={
          published
            ? "It is published: saving takes its new room, time and pianist, or changes nothing. Issue the call sheet again afterwards."
            : "A draft: nobody is told yet."
        }
      />
      {state === "cancelled" ? (
        <Notice tone="caution" title="This call is cancelled.">
          Restore it on its page first, then change it.
        </Notice>
      ) : (
        <ChangeCallForm
          choices={choices}
          initial={{ ...fieldsOf(draft), callId, version }}
          published={published}
        />
      )}
    </>
  );
}
