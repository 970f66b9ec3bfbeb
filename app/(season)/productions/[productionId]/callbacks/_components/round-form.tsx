"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useEffect } from "react";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Notice } from "@/components/ui/notice";
import { Select } from "@/components/ui/select";
import { Textarea } from "@/components/ui/textarea";
import { showToast } from "@/components/ui/toast-store";
import { callbacksQuery, type DraftRound } from "@/lib/client/callbacks";
import type { RoomChoice } from "@/lib/data/rooms";
import { clock, localDay } from "@/lib/format-dates";
import { changeRound } from "../actions";
import { whenInWords } from "./round-summary";

function valuesOf(productionId: string, round: DraftRound) {
  const at = (iso: string | null, write: (at: Date, zone: string) => string) =>
    iso === null ? "" : write(new Date(iso), round.zone);
  return {
    productionId,
    roundId: round.id,
    version: round.version,
    localDate: at(round.startsAt, localDay),
    from: at(round.startsAt, clock),
    to: at(round.endsAt, clock),
    roomId: round.roomId ?? "",
    material: round.material ?? "",
  };
}

/** When and where the round is, and what to prepare. Nothing goes out by saving it. */
export function RoundForm({
  productionId,
  round,
  rooms,
}: {
  productionId: string;
  round: DraftRound;
  rooms: readonly RoomChoice[];
}) {
  const client = useQueryClient();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/callbacks").then((m) => m.changeRoundSchema),
    action: changeRound,
    defaultValues: valuesOf(productionId, round),
    onDone: async (_, form) => {
      // What was saved is the new ground; the server counted one up.
      const kept = form.getValues();
      form.reset({ ...kept, version: Number(kept.version) + 1 });
      showToast({
        title:
          round.issue > 0
            ? "Saved. It goes out when you publish again."
            : "Saved. Nothing has gone out.",
      });
      await client.invalidateQueries({ queryKey: callbacksQuery(productionId).queryKey });
    },
  });
  const { register, formState, reset, setValue, getValues } = state.form;
  const { errors, isDirty } = formState;
  const behind = round.version > Number(getValues("version"));

  useEffect(() => {
    // Someone else saved, or it was published: an untouched form follows along.
    if (behind && !isDirty && !state.pending) reset(valuesOf(productionId, round));
  }, [behind, isDirty, state.pending, reset, productionId, round]);

  return (
    <ActionForm state={state} submitLabel="Save when and where" className="gap-3">
      {behind && isDirty && (
        <Notice
          tone="caution"
          live
          title="Someone else saved this meanwhile."
          actions={
            <>
              <Button
                size="small"
                onClick={() => {
                  setValue("version", round.version);
                  void state.submit();
                }}
              >
                Save mine
              </Button>
              <Button size="small" onClick={() => reset(valuesOf(productionId, round))}>
                Take theirs
              </Button>
            </>
          }
        >
          It now says: {whenInWords(round)}
          {round.room !== null && `, ${round.room}`}
          {round.material !== null && `; ${round.material}`}. What you typed is still below.
        </Notice>
      )}
      <Field label="Day" error={errors.localDate?.message}>
        <Input type="date" {...register("localDate")} />
      </Field>
      <div className="grid grid-cols-2 gap-3">
        <Field label="From" error={errors.from?.message}>
          <Input type="time" {...register("from")} />
        </Field>
        <Field label="To" error={errors.to?.message}>
          <Input type="time" {...register("to")} />
        </Field>
      </div>
      <Field label="Room" error={errors.roomId?.message}>
        <Select {...register("roomId")}>
          <option value="">To follow</option>
          {rooms.map((room) => (
            <option key={room.id} value={room.id}>
              {room.name}, {room.venue}
            </option>
          ))}
        </Select>
      </Field>
      <Field label="What to prepare" optional error={errors.material?.message}>
        <Textarea rows={3} {...register("material")} />
      </Field>
    </ActionForm>
  );
}
