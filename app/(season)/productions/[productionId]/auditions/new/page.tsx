import type { Metadata } from "next";
import { PageTitle } from "@/components/layout/page-title";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { listDayChoices } from "@/lib/data/auditions/days";
import { NewDayForm } from "../_components/day-form";

export const metadata: Metadata = { title: "Make an audition day" };

/** A new audition day: date, rooms, slots, rests and lunch. */
export default async function NewDayPage({
  params,
}: PageProps<"/productions/[productionId]/auditions/new">) {
  const { productionId } = await params;
  const actor = await pageActor(`/productions/${productionId}/auditions/new`);
  const choices = await orNotFound(listDayChoices(actor, productionId));
  const initial = {
    productionId,
    localDate: "",
    slotMinutes: "8",
    restAfterMinutes: "80",
    restMinutes: "10",
    lunchMinutes: "60",
    lunchFrom: "12:30",
    lunchTo: "14:00",
    hold: false,
    rooms: [],
  };
  return (
    <>
      <PageTitle
        title="Make an audition day"
        sub="The rooms are booked when you save; a room that is taken says who has it."
      />
      <NewDayForm choices={choices} initial={initial} />
    </>
  );
}
