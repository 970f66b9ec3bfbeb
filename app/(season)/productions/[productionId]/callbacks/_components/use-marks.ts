"use client";

import { useIsMutating, useMutation, useQueryClient } from "@tanstack/react-query";
import { showToast } from "@/components/ui/toast-store";
import { callbacksQuery, withMark } from "@/lib/client/callbacks";
import { orRefuse } from "@/lib/client/refusal";
import { setMark } from "../actions";

export type Mark = { personId: string; roleId: string; on: boolean };

/** Ticks that show at once; one that is refused goes back and says why. */
export function useMarks(productionId: string) {
  const client = useQueryClient();
  const { queryKey } = callbacksQuery(productionId);
  const mutationKey = ["mark", productionId];
  const { mutate } = useMutation({
    mutationKey,
    mutationFn: (mark: Mark & { roundId: string }) => orRefuse(setMark({ productionId, ...mark })),
    onMutate: async (mark) => {
      await client.cancelQueries({ queryKey });
      client.setQueryData(queryKey, (draft) => draft && withMark(draft, mark));
    },
    onError: (error, mark) => {
      client.setQueryData(queryKey, (draft) => draft && withMark(draft, { ...mark, on: !mark.on }));
      showToast({ tone: "error", title: error.message });
    },
    onSettled: async () => {
      // Several boxes in a row: only the last one reads the list again.
      if (client.isMutating({ mutationKey }) === 1) await client.invalidateQueries({ queryKey });
    },
  });
  return { mark: mutate, busy: useIsMutating({ mutationKey }) > 0 };
}
