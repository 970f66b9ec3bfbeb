import { notFound } from "next/navigation";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { assertDay } from "@/lib/data/auditions/days";
import { idField } from "@/lib/schemas/common";

/** Asks for the day outside the loading state, so that one that is not there answers 404 before anything is sent. */
export default async function AuditionDayLayout({
  children,
  params,
}: LayoutProps<"/productions/[productionId]/auditions/[dayId]">) {
  const { productionId, dayId } = await params;
  const actor = await pageActor(`/productions/${productionId}/auditions/${dayId}`);
  if (!idField.safeParse(dayId).success) notFound();
  await orNotFound(assertDay(actor, productionId, dayId));
  return children;
}
