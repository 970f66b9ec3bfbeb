import type { Metadata } from "next";
import { PageTitle } from "@/components/layout/page-title";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { readDay } from "@/lib/data/auditions/day-view";
import { listDayChoices } from "@/lib/data/auditions/days";
import { clock, longDay } from "@/lib/format-dates";
import { ChangeDayForm } from "../../_components/day-form";

export const metadata: Metadata = { title: "Change the audition day" };

/** Changes an audition day; whoever's time still exists keeps it. */
export default async function ChangeDayPage({
  params,
}: PageProps<"/productions/[productionId]/auditions/[dayId]/change">) {
  const { productionId, dayId } = await params;
  const actor = await pageActor(`/productions/${productionId}/auditions/${dayId}/change`);
  const [choices, day] = await orNotFound(
    Promise.all([listDayChoices(actor, productionId), readDay(actor, productionId, dayId)]),
  );
  const initial = {
    productionId,
    dayId,
    version: day.version,
    mayLose: [],
    localDate: day.localDate,
    slotMinutes: String(day.slotMinutes),
    restAfterMinutes: String(day.restAfterMinutes),
    restMinutes: String(day.restMinutes),
    lunchMinutes: String(day.lunchMinutes),
    lunchFrom: day.lunchFrom ?? "",
    lunchTo: day.lunchTo ?? "",
    hold: day.hold,
    rooms: day.rooms.map((room) => ({
      roomId: room.roomId,
      opens: clock(new Date(room.opensAt), day.zone),
      closes: clock(new Date(room.closesAt), day.zone),
    })),
  };
  return (
    <>
      <PageTitle
        title={longDay(day.localDate, choices.locale)}
        sub="Whoever’s room and time still exist keeps them. If others would lose theirs, you are asked first."
      />
      <ChangeDayForm choices={{ ...choices, zone: day.zone }} initial={initial} />
    </>
  );
}
