"use client";

import { useMutation, useQueryClient } from "@tanstack/react-query";
import { showToast } from "@/components/ui/toast-store";
import type { AuditionDayView } from "@/lib/auditions/day-view";
import { auditionDayQuery, findSlot, slotOfSinger, withSingerMoved } from "@/lib/client/auditions";
import { clock } from "@/lib/format-dates";
import { placeSinger, swapSingers, takeOut } from "../../actions";

/** A singer goes to a slot (whoever is there changes places with them), or out of it (null). */
export type Move = { signUpId: string; slotId: string | null };

/**
 * Moves on a day: shown at once, taken back with the reason when the server refuses. An undo is offered unless somebody
 * was written to.
 */
export function useMoves(day: AuditionDayView): { move: (move: Move) => void; pending: boolean } {
  const client = useQueryClient();
  const key = auditionDayQuery(day.productionId, day.id).queryKey;
  const mutation = useMutation({
    mutationFn: async ({ signUpId, slotId, seen }: Move & { seen: AuditionDayView }) => {
      const result = await send(seen, { signUpId, slotId });
      if (!result.ok) throw new Error(result.error.message);
    },
    onMutate: async ({ signUpId, slotId }) => {
      await client.cancelQueries({ queryKey: key });
      const before = client.getQueryData(key);
      client.setQueryData(key, (now) => now && withSingerMoved(now, signUpId, slotId));
      return { before };
    },
    onError: (error, _move, context) => {
      if (context?.before) client.setQueryData(key, context.before);
      showToast({ title: error.message, tone: "error" });
    },
    onSuccess: (_result, { signUpId, slotId, seen }) => {
      const from = slotOfSinger(seen, signUpId);
      const told = toldBy(seen, { signUpId, slotId }).length > 0;
      const undoable =
        !told && !(from === null && slotId !== null && findSlot(seen, slotId)?.item.singer);
      showToast({
        title: inWords(seen, { signUpId, slotId }),
        ...(undoable && {
          undo: () => {
            const now = client.getQueryData(key);
            if (now) mutation.mutate({ signUpId, slotId: from, seen: now });
          },
        }),
      });
    },
    onSettled: () => client.invalidateQueries({ queryKey: key }),
  });
  return { move: (move) => mutation.mutate({ ...move, seen: day }), pending: mutation.isPending };
}

function send(seen: AuditionDayView, { signUpId, slotId }: Move) {
  const { productionId } = seen;
  const from = slotOfSinger(seen, signUpId);
  if (slotId === null) return takeOut({ productionId, signUpId });
  const sitting = findSlot(seen, slotId)?.item.singer;
  if (!sitting || from === null)
    return placeSinger({ productionId, signUpId, slotId, seenIn: from });
  return swapSingers({
    productionId,
    first: { signUpId, slotId: from },
    second: { signUpId: sitting.signUpId, slotId },
  });
}

/** Who has been told the time they would lose by this move: they are written to, or have to be. */
export function toldBy(day: AuditionDayView, { signUpId, slotId }: Move): string[] {
  const moved = [
    day.rooms.flatMap((room) => room.items).find((item) => item.singer?.signUpId === signUpId)
      ?.singer,
    slotId === null ? null : findSlot(day, slotId)?.item.singer,
  ];
  return moved.flatMap((singer) =>
    singer && (singer.state === "invited" || singer.state === "confirmed") ? [singer.name] : [],
  );
}

function inWords(day: AuditionDayView, { signUpId, slotId }: Move): string {
  const name =
    [
      ...day.waiting,
      ...day.rooms.flatMap((room) => room.items.flatMap((item) => item.singer ?? [])),
    ].find((s) => s.signUpId === signUpId)?.name ?? "The singer";
  if (slotId === null) return `${name} waits for a time again.`;
  const found = findSlot(day, slotId);
  if (!found) return `${name} is moved.`;
  const at = `${clock(new Date(found.item.startsAt), day.zone)}, ${found.room.name}`;
  return found.item.singer
    ? `${name} and ${found.item.singer.name} changed places.`
    : `${name} sings at ${at}.`;
}
