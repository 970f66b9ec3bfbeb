import { notFound } from "next/navigation";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { assertReading } from "@/lib/data/score/review";
import { idField } from "@/lib/schemas/common";

/** Asks for the reading outside the loading state, so that one that is not there answers 404 before anything is sent. */
export default async function ReadingLayout({
  children,
  params,
}: LayoutProps<"/productions/[productionId]/score/read/[scoreId]">) {
  const { productionId, scoreId } = await params;
  const actor = await pageActor(`/productions/${productionId}/score/read/${scoreId}`);
  if (!idField.safeParse(scoreId).success) notFound();
  await orNotFound(assertReading(actor, productionId, scoreId));
  return children;
}
