import type { Metadata } from "next";
import { LiveData } from "@/components/layout/live-data";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { readDay } from "@/lib/data/auditions/day-view";
import { listAccompanists } from "@/lib/data/auditions/pianists";
import { productionFor } from "@/lib/data/guard";
import { DayBoard } from "../_components/day-board";

export const metadata: Metadata = { title: "Audition day" };

/** One audition day: rooms, slots, singers and pianists, live. */
export default async function AuditionDayPage({
  params,
}: PageProps<"/productions/[productionId]/auditions/[dayId]">) {
  const { productionId, dayId } = await params;
  const actor = await pageActor(`/productions/${productionId}/auditions/${dayId}`);
  const [scope, day, accompanists] = await orNotFound(
    Promise.all([
      productionFor(actor, productionId, "auditions:read"),
      readDay(actor, productionId, dayId),
      listAccompanists(actor, productionId),
    ]),
  );
  return (
    <LiveData>
      <DayBoard initial={day} accompanists={accompanists} locale={scope.locale} />
    </LiveData>
  );
}
