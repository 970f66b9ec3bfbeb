"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { useState } from "react";
import { Notice } from "@/components/ui/notice";
import { showToast } from "@/components/ui/toast-store";
import type { DoorItem, DoorView } from "@/lib/auditions/door-view";
import { doorQuery } from "@/lib/client/auditions";
import { clock } from "@/lib/format-dates";
import type { DoorAct } from "@/lib/schemas/auditions";
import { actAtDoor } from "../actions";
import { DoorFrame } from "./door-frame";
import { DoorRoom } from "./door-room";

const NEXT_STATE: Record<DoorAct, DoorItem["state"]> = {
  here: "here",
  "not-here": "not here yet",
  in: "inside",
  out: "heard",
};

/** The view as it will be once the act is done. */
function withAct(view: DoorView, signUpId: string, act: DoorAct): DoorView {
  if (!view.open) return view;
  return {
    ...view,
    rooms: view.rooms.map((room) => {
      if (!room.items.some((item) => item.signUpId === signUpId)) return room;
      return {
        ...room,
        items: room.items.map((item): DoorItem => {
          if (item.signUpId === signUpId)
            return {
              ...item,
              state: NEXT_STATE[act],
              inAt: act === "in" ? new Date().toISOString() : item.inAt,
            };
          return act === "in" && item.state === "inside" ? { ...item, state: "heard" } : item;
        }),
      };
    }),
  };
}

/** The running order, live, a room at a time. */
export function DoorBoard({ token, initial }: { token: string; initial: DoorView }) {
  const client = useQueryClient();
  const query = useQuery({ ...doorQuery(token), initialData: initial });
  const key = doorQuery(token).queryKey;
  const view = query.data;
  const [roomId, setRoomId] = useState<string | null>(null);
  const mutation = useMutation({
    mutationFn: async ({ signUpId, act }: { signUpId: string; act: DoorAct }) => {
      const result = await actAtDoor({ token, signUpId, act });
      if (!result.ok) throw new Error(result.error.message);
    },
    onMutate: async ({ signUpId, act }) => {
      await client.cancelQueries({ queryKey: key });
      const before = client.getQueryData(key);
      client.setQueryData(key, (now) => now && withAct(now, signUpId, act));
      return { before };
    },
    onError: (error, _act, context) => {
      if (context?.before) client.setQueryData(key, context.before);
      showToast({ title: error.message, tone: "error" });
    },
    onSettled: () => client.invalidateQueries({ queryKey: key }),
  });

  if (!view.open) {
    return (
      <DoorFrame note="">
        <h1 className="text-2xl">Not today</h1>
        <p className="mt-2 text-ink-2">{view.notice}</p>
      </DoorFrame>
    );
  }
  const room = view.rooms.find((r) => r.id === roomId) ?? view.rooms[0];
  return (
    <DoorFrame note={`${room?.name ?? view.day}, ${clock(new Date(view.now), view.zone)}`}>
      <h1 className="sr-only">
        {view.day}, {room?.name}
      </h1>
      {view.rooms.length > 1 && (
        <div role="group" aria-label="Room" className="mb-4 flex gap-2">
          {view.rooms.map((r) => (
            <button
              key={r.id}
              type="button"
              aria-pressed={r.id === room?.id}
              onClick={() => setRoomId(r.id)}
              className="min-h-11 min-w-0 flex-1 rounded-md border border-ink px-3 font-bold aria-pressed:bg-ink aria-pressed:text-paper"
            >
              {r.name}
            </button>
          ))}
        </div>
      )}
      {query.isError && (
        <Notice tone="caution" title="This may be old." className="mb-4">
          {query.error.message}
        </Notice>
      )}
      {room ? (
        <DoorRoom
          room={room}
          view={view}
          onAct={(signUpId, act) => mutation.mutate({ signUpId, act })}
        />
      ) : (
        <p>No room is open today.</p>
      )}
    </DoorFrame>
  );
}
