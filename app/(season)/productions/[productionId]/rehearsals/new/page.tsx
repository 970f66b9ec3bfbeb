import type { Metadata } from "next";
import { PageTitle } from "@/components/layout/page-title";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { readCallChoices } from "@/lib/data/calls/choices";
import { localDateField } from "@/lib/schemas/common";
import { NewCallForm } from "../_components/call-form";

export const metadata: Metadata = { title: "Make a call" };

/** A new call: when, where, and the numbers it works on. */
export default async function NewCallPage({
  params,
  searchParams,
}: PageProps<"/productions/[productionId]/rehearsals/new">) {
  const { productionId } = await params;
  const actor = await pageActor(`/productions/${productionId}/rehearsals/new`);
  const choices = await orNotFound(readCallChoices(actor, productionId));
  const day = localDateField.safeParse((await searchParams)["day"]);
  const own = choices.leaders.find(({ id }) => actor.people.some((person) => person.id === id));
  return (
    <>
      <PageTitle
        title="Make a call"
        sub="Saved as a draft: nobody is told, and no room or pianist is taken until you publish it."
      />
      <NewCallForm
        choices={choices}
        initial={{
          productionId,
          kind: "music",
          title: "",
          localDate: day.success ? day.data : "",
          localTime: "18:30",
          roomId: "",
          leaderId: own?.id ?? "",
          pianistId: "",
          blocks: [],
          hand: [],
        }}
      />
    </>
  );
}
