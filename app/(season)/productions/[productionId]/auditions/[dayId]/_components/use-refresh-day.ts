"use client";

import { useQueryClient } from "@tanstack/react-query";
import type { AuditionDayView } from "@/lib/auditions/day-view";
import { auditionDayQuery } from "@/lib/client/auditions";

/** Reads the day again now, after something was saved. */
export function useRefreshDay(
  day: Pick<AuditionDayView, "id" | "productionId">,
): () => Promise<void> {
  const client = useQueryClient();
  return () =>
    client.invalidateQueries({ queryKey: auditionDayQuery(day.productionId, day.id).queryKey });
}
