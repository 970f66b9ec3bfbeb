"use client";

import { useIsMutating, useMutation, useQueryClient } from "@tanstack/react-query";
import { useState } from "react";
import { showToast } from "@/components/ui/toast-store";
import { castingQuery, choiceInWords, withChoice, type Choice } from "@/lib/client/casting";
import { Refusal, orRefuse } from "@/lib/client/refusal";
import { choose } from "../actions";

export type Wish = {
  personId: string;
  roleId: string;
  /** "Wren Tallis as Maren", for messages. */
  title: string;
  /** What stood there when it was pressed. */
  before: Choice | null;
  after: { state: Choice["state"]; kind: Choice["kind"] } | null;
};

export type RefusedWish = { wish: Wish; code: Refusal["code"]; message: string };

/** The choice as it will stand: a new row begins at version 1, a changed one goes up by one. */
function standing(wish: Wish): Choice | null {
  return wish.after && { ...wish.after, version: (wish.before?.version ?? 0) + 1 };
}

/**
 * Choosing in the grid: it shows at once, goes back when it is refused, and can be undone from the
 * message that says it was done.
 */
export function useChoose(productionId: string) {
  const client = useQueryClient();
  const { queryKey } = castingQuery(productionId);
  const mutationKey = ["choose", productionId];
  const [refused, setRefused] = useState<RefusedWish | null>(null);

  const { mutate } = useMutation({
    mutationKey,
    mutationFn: (wish: Wish) =>
      orRefuse(
        choose({
          productionId,
          roleId: wish.roleId,
          personId: wish.personId,
          state: wish.after?.state ?? "none",
          kind: wish.after?.kind ?? "principal",
          version: wish.before?.version ?? 0,
        }),
      ),
    onMutate: async (wish) => {
      setRefused(null);
      await client.cancelQueries({ queryKey });
      client.setQueryData(queryKey, (grid) => grid && withChoice(grid, wish, standing(wish)));
    },
    onSuccess: (_, wish) => {
      const words = choiceInWords(wish.after).toLowerCase();
      showToast({
        title: `${wish.title}: ${words === "" ? "taken back" : words}.`,
        undo: () => mutate({ ...wish, before: standing(wish), after: wish.before }),
      });
    },
    onError: (error, wish) => {
      client.setQueryData(queryKey, (grid) => grid && withChoice(grid, wish, wish.before));
      const code = error instanceof Refusal ? error.code : "fault";
      setRefused({ wish, code, message: error.message });
    },
    onSettled: () => client.invalidateQueries({ queryKey }),
  });

  return {
    choose: mutate,
    busy: useIsMutating({ mutationKey }) > 0,
    refused,
    dropRefused: () => setRefused(null),
  };
}
