"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { FormProvider, useFormContext, useWatch } from "react-hook-form";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Checkbox } from "@/components/ui/checkbox";
import { Field, FieldGroup } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import type { SlotLost } from "@/lib/data/auditions/change-day";
import type { DayChoices } from "@/lib/data/auditions/days";
import { changeDay, createDay } from "../actions";
import { AgreeToLoss } from "./agree-to-loss";
import type { DayFields } from "./day-fields";
import { DayPreview } from "./day-preview";

type Existing = DayFields & { dayId: string; version: number; mayLose: string[] };

type Props = { choices: DayChoices; initial: DayFields };

/** Makes a new audition day. */
export function NewDayForm({ choices, initial }: Props) {
  const router = useRouter();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/auditions").then((m) => m.createDaySchema),
    action: createDay,
    defaultValues: initial,
    onDone: ({ dayId }) => router.push(`/productions/${initial.productionId}/auditions/${dayId}`),
  });
  return (
    <ActionForm state={state} submitLabel="Make the day">
      <FormProvider {...state.form}>
        <DayFieldset choices={choices} />
      </FormProvider>
    </ActionForm>
  );
}

/** Changes a day; asks once when somebody would lose their slot. */
export function ChangeDayForm({ choices, initial }: { choices: DayChoices; initial: Existing }) {
  const router = useRouter();
  const [lost, setLost] = useState<readonly SlotLost[] | null>(null);
  const state = useActionForm({
    schema: () => import("@/lib/schemas/auditions").then((m) => m.changeDaySchema),
    action: changeDay,
    defaultValues: initial,
    onDone: (result) => {
      if (!result.saved) {
        setLost(result.lost);
        return;
      }
      router.push(`/productions/${initial.productionId}/auditions/${initial.dayId}`);
      router.refresh();
    },
  });
  return (
    <>
      <ActionForm state={state} submitLabel="Save the day">
        <FormProvider {...state.form}>
          <DayFieldset choices={choices} />
        </FormProvider>
      </ActionForm>
      {lost !== null && (
        <AgreeToLoss
          lost={lost}
          onKeep={() => setLost(null)}
          onAgree={async () => {
            state.form.setValue(
              "mayLose",
              lost.map((singer) => singer.signUpId),
            );
            setLost(null);
            await state.submit();
          }}
        />
      )}
    </>
  );
}

/** The fields of a day, shared by making and changing it, with the figures that follow from them. */
function DayFieldset({ choices }: { choices: DayChoices }) {
  const { register, formState, setValue, control, getValues } = useFormContext<DayFields>();
  const values = { ...getValues(), ...useWatch({ control }) } as DayFields;
  const used = values.rooms;
  const errors = formState.errors;
  const message = (name: Exclude<keyof DayFields, "rooms" | "productionId">): string | undefined =>
    errors[name]?.message;

  function toggle(roomId: string, on: boolean) {
    const last = used.at(-1);
    const next = on
      ? [...used, { roomId, opens: last?.opens ?? "10:00", closes: last?.closes ?? "16:00" }]
      : used.filter((room) => room.roomId !== roomId);
    setValue("rooms", next, { shouldDirty: true, shouldValidate: formState.isSubmitted });
  }

  function setTime(roomId: string, which: "opens" | "closes", time: string) {
    setValue(
      "rooms",
      used.map((room) => (room.roomId === roomId ? { ...room, [which]: time } : room)),
      { shouldDirty: true },
    );
  }

  return (
    <>
      <Field label="Day" error={message("localDate")}>
        <Input type="date" className="max-w-52" {...register("localDate")} />
      </Field>
      <FieldGroup
        legend="Rooms"
        hint={`Times are on the clock of ${choices.zone.replaceAll("_", " ")}.`}
        error={errors.rooms?.message ?? errors.rooms?.root?.message}
      >
        {choices.rooms.length === 0 && (
          <p className="text-ink-2">
            The company has no rooms yet. Its admin or a stage manager adds them on the company’s
            page.
          </p>
        )}
        {choices.rooms.map((room) => {
          const chosen = used.find((r) => r.roomId === room.id);
          return (
            <div
              key={room.id}
              className="flex flex-wrap items-center gap-x-6 gap-y-2 border-b border-rule py-2"
            >
              <Checkbox
                className="min-w-56 flex-1"
                label={`${room.name}, ${room.venue}`}
                {...(!room.hasPiano && { note: "No piano in this room" })}
                checked={chosen !== undefined}
                onChange={(event) => toggle(room.id, event.currentTarget.checked)}
              />
              {chosen && (
                <div className="flex gap-4">
                  <Field label={`${room.name} opens`} className="w-36">
                    <Input
                      type="time"
                      value={chosen.opens}
                      onChange={(event) => setTime(room.id, "opens", event.currentTarget.value)}
                    />
                  </Field>
                  <Field label={`${room.name} closes`} className="w-36">
                    <Input
                      type="time"
                      value={chosen.closes}
                      onChange={(event) => setTime(room.id, "closes", event.currentTarget.value)}
                    />
                  </Field>
                </div>
              )}
            </div>
          );
        })}
      </FieldGroup>
      <div className="grid gap-4 sm:grid-cols-3">
        <Field label="Minutes a slot" error={message("slotMinutes")}>
          <Input inputMode="numeric" {...register("slotMinutes")} />
        </Field>
        <Field label="Pianist rests, minutes" error={message("restMinutes")}>
          <Input inputMode="numeric" {...register("restMinutes")} />
        </Field>
        <Field label="after playing, minutes" error={message("restAfterMinutes")}>
          <Input inputMode="numeric" {...register("restAfterMinutes")} />
        </Field>
        <Field label="Lunch, minutes" error={message("lunchMinutes")}>
          <Input inputMode="numeric" {...register("lunchMinutes")} />
        </Field>
        <Field label="Lunch not before" error={message("lunchFrom")}>
          <Input type="time" {...register("lunchFrom")} />
        </Field>
        <Field label="Lunch over by" error={message("lunchTo")}>
          <Input type="time" {...register("lunchTo")} />
        </Field>
      </div>
      <p className="text-sm text-ink-2">
        The rests stand as common practice has them. Your pianist’s agreement and local rules
        decide: ask before you shorten one.
      </p>
      <Checkbox label="Hold one slot an hour for late-comers" {...register("hold")} />
      <DayPreview values={values} choices={choices} />
    </>
  );
}
