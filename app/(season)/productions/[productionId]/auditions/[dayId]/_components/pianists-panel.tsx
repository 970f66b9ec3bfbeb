"use client";

import { useState } from "react";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { SectionTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { showToast } from "@/components/ui/toast-store";
import type { AuditionDayView, PianistOnDay, RoomOnDay } from "@/lib/auditions/day-view";
import { pianistLanes } from "@/lib/auditions/pianist-lanes";
import { clock, clockSpan } from "@/lib/format-dates";
import { assignPianist, removePianist } from "../../actions";
import { LOST_CONNECTION } from "@/components/forms/lost-connection";
import { useRefreshDay } from "./use-refresh-day";

type Props = { day: AuditionDayView; accompanists: readonly { personId: string; name: string }[] };

/** Who plays in which room, and when nobody does. */
export function PianistsPanel({ day, accompanists }: Props) {
  const refresh = useRefreshDay(day);

  async function remove(session: PianistOnDay, room: RoomOnDay) {
    const result = await removePianist({
      productionId: day.productionId,
      sessionId: session.id,
    }).catch(() => null);
    if (!result?.ok) {
      showToast({ title: result ? result.error.message : LOST_CONNECTION, tone: "error" });
      return;
    }
    await refresh();
    showToast({
      title: `${session.name} is free again.`,
      undo: async () => {
        const again = await assignPianist({
          productionId: day.productionId,
          auditionRoomId: room.id,
          personId: session.personId,
          from: clock(new Date(session.startsAt), day.zone),
          to: clock(new Date(session.endsAt), day.zone),
        });
        if (!again.ok) showToast({ title: again.error.message, tone: "error" });
        await refresh();
      },
    });
  }

  return (
    <section aria-labelledby="pianists">
      <SectionTitle id="pianists" ruled>
        Pianists
      </SectionTitle>
      <ul>
        {day.rooms.map((room) => (
          <li key={room.id} className="border-b border-rule py-2 text-sm">
            <h3 className="small-caps">{room.name}</h3>
            <ul>
              {pianistLanes(room).map((piece) => {
                const session = room.pianists.find((p) => p.id === piece.id);
                const span = clockSpan(new Date(piece.startsAt), new Date(piece.endsAt), day.zone);
                return (
                  <li key={piece.id} className="flex min-h-9 items-center justify-between gap-2">
                    {piece.name === null ? (
                      <strong className="text-vermilion">no pianist, {span}</strong>
                    ) : (
                      <span>
                        <strong>{piece.name}</strong>, {span}
                      </span>
                    )}
                    {session && day.may.assign && (
                      <Button
                        size="small"
                        kind="quiet"
                        aria-label={`Take ${session.name} out of ${room.name}, ${span}`}
                        onClick={() => void remove(session, room)}
                      >
                        Take out
                      </Button>
                    )}
                  </li>
                );
              })}
            </ul>
          </li>
        ))}
      </ul>
      {day.may.assign && <AssignPianist day={day} accompanists={accompanists} />}
    </section>
  );
}

function AssignPianist({ day, accompanists }: Props) {
  const [open, setOpen] = useState(false);
  return (
    <div className="mt-3">
      <Dialog
        open={open}
        onOpenChange={setOpen}
        trigger={<Button>Assign a pianist</Button>}
        title="Assign a pianist"
        description="For all of a room’s time or a part of it. A pianist who is taken says where and when."
      >
        {accompanists.length === 0 ? (
          <p>This production has no accompanist yet. Invite one on the People page first.</p>
        ) : (
          <AssignForm day={day} accompanists={accompanists} onDone={() => setOpen(false)} />
        )}
      </Dialog>
    </div>
  );
}

/** The first stretch of a room that has nobody, or all of its time. */
function suggestion(room: RoomOnDay | undefined, zone: string): { from: string; to: string } {
  if (!room) return { from: "", to: "" };
  const gap = pianistLanes(room).find((piece) => piece.name === null);
  const whole = room.pianists.length === 0 || !gap;
  return {
    from: clock(new Date(whole ? room.opensAt : gap.startsAt), zone),
    to: clock(new Date(whole ? room.closesAt : gap.endsAt), zone),
  };
}

function AssignForm({ day, accompanists, onDone }: Props & { onDone: () => void }) {
  const refresh = useRefreshDay(day);
  const first =
    day.rooms.find((room) => pianistLanes(room).some((piece) => piece.name === null)) ??
    day.rooms[0];
  const state = useActionForm({
    schema: () => import("@/lib/schemas/auditions").then((m) => m.assignPianistSchema),
    action: assignPianist,
    defaultValues: {
      productionId: day.productionId,
      auditionRoomId: first?.id ?? "",
      personId: accompanists[0]?.personId ?? "",
      ...suggestion(first, day.zone),
    },
    onDone: async () => {
      showToast({ title: "The pianist is assigned." });
      onDone();
      await refresh();
    },
  });
  const { register, formState, setValue } = state.form;
  const { errors } = formState;
  return (
    <ActionForm state={state} submitLabel="Assign">
      <Field label="Pianist" error={errors.personId?.message}>
        <Select {...register("personId")}>
          {accompanists.map((person) => (
            <option key={person.personId} value={person.personId}>
              {person.name}
            </option>
          ))}
        </Select>
      </Field>
      <Field label="Room" error={errors.auditionRoomId?.message}>
        <Select
          {...register("auditionRoomId", {
            onChange: (event: { target: { value: string } }) => {
              const times = suggestion(
                day.rooms.find((room) => room.id === event.target.value),
                day.zone,
              );
              setValue("from", times.from);
              setValue("to", times.to);
            },
          })}
        >
          {day.rooms.map((room) => (
            <option key={room.id} value={room.id}>
              {room.name}
            </option>
          ))}
        </Select>
      </Field>
      <div className="flex flex-wrap gap-4">
        <Field label="From" error={errors.from?.message}>
          <Input type="time" className="w-36" {...register("from")} />
        </Field>
        <Field label="To" error={errors.to?.message}>
          <Input type="time" className="w-36" {...register("to")} />
        </Field>
      </div>
    </ActionForm>
  );
}
