"use client";

import { useRouter } from "next/navigation";
import { FormProvider, useFormContext, useWatch } from "react-hook-form";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { SideColumn } from "@/components/layout/side-column";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { CALL_KINDS, CALL_KIND_NAMES } from "@/lib/calls/call-kinds";
import { applyRemedy } from "@/lib/calls/apply-remedy";
import type { Remedy } from "@/lib/calls/types";
import type { CallChoices } from "@/lib/data/calls/choices";
import { changeCall, createCall } from "../actions";
import { BlockList } from "./block-list";
import type { CallFields } from "./call-fields";
import { CheckPanel } from "./check-panel";
import { HandChanges } from "./hand-changes";
import { lastOf, useCallCheck } from "./use-call-check";

/** Makes a new call; it is saved as a draft. */
export function NewCallForm({ choices, initial }: { choices: CallChoices; initial: CallFields }) {
  const router = useRouter();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/calls").then((m) => m.createCallSchema),
    action: createCall,
    defaultValues: initial,
    onDone: ({ callId }) =>
      router.push(`/productions/${initial.productionId}/rehearsals/${callId}`),
  });
  return (
    <ActionForm state={state} submitLabel="Save the draft" className="max-w-none!">
      <FormProvider {...state.form}>
        <CallFieldset choices={choices} callId={null} />
      </FormProvider>
    </ActionForm>
  );
}

/** Changes a call; a published one takes its new room and time when it is saved. */
export function ChangeCallForm({
  choices,
  initial,
  published,
}: {
  choices: CallChoices;
  initial: CallFields & { callId: string; version: number };
  published: boolean;
}) {
  const router = useRouter();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/calls").then((m) => m.changeCallSchema),
    action: changeCall,
    defaultValues: initial,
    onDone: ({ callId }) => {
      router.push(`/productions/${initial.productionId}/rehearsals/${callId}`);
      router.refresh();
    },
  });
  return (
    <ActionForm
      state={state}
      submitLabel={published ? "Save the published call" : "Save the draft"}
      className="max-w-none!"
    >
      <FormProvider {...state.form}>
        <CallFieldset choices={choices} callId={initial.callId} />
      </FormProvider>
    </ActionForm>
  );
}

function CallFieldset({ choices, callId }: { choices: CallChoices; callId: string | null }) {
  const { register, formState, control, getValues, setValue } = useFormContext<CallFields>();
  const fields = { ...getValues(), ...useWatch({ control }) } as CallFields;
  const check = useCallCheck(fields, callId);
  const errors = formState.errors;

  function take(remedy: Remedy) {
    const next = applyRemedy<CallFields["blocks"][number], CallFields>(getValues(), remedy);
    for (const name of [
      "localDate",
      "localTime",
      "roomId",
      "pianistId",
      "blocks",
      "hand",
    ] as const) {
      setValue(name, next[name], { shouldDirty: true });
    }
  }

  return (
    <SideColumn sideLabel="What follows from it" side={<CheckPanel state={check} onTake={take} />}>
      <div className="flex flex-col gap-8">
        <div className="grid gap-4 sm:grid-cols-2 xl:grid-cols-3">
          <Field label="Kind" error={errors.kind?.message}>
            <Select {...register("kind")}>
              {CALL_KINDS.map((kind) => (
                <option key={kind} value={kind}>
                  {CALL_KIND_NAMES[kind]}
                </option>
              ))}
            </Select>
          </Field>
          <Field label="Day" error={errors.localDate?.message}>
            <Input type="date" {...register("localDate")} />
          </Field>
          <Field label="Starts" error={errors.localTime?.message}>
            <Input type="time" {...register("localTime")} />
          </Field>
          <Field label="Room" error={errors.roomId?.message}>
            <Select {...register("roomId")}>
              <option value="">No room yet</option>
              {choices.rooms.map((room) => (
                <option key={room.id} value={room.id}>
                  {room.name}, {room.venueName}
                  {room.hasPiano ? "" : " (no piano)"}
                </option>
              ))}
            </Select>
          </Field>
          <Field label="Leads" error={errors.leaderId?.message}>
            <Select {...register("leaderId")}>
              <option value="">Nobody yet</option>
              {choices.leaders.map((person) => (
                <option key={person.id} value={person.id}>
                  {person.name}
                </option>
              ))}
            </Select>
          </Field>
          <Field
            label="At the piano"
            error={errors.pianistId?.message}
            {...(!choices.mayAssignPianist && { hint: "The music director assigns pianists." })}
          >
            {choices.mayAssignPianist ? (
              <Select {...register("pianistId")}>
                <option value="">Nobody</option>
                {choices.pianists.map((person) => (
                  <option key={person.id} value={person.id}>
                    {person.name}
                  </option>
                ))}
              </Select>
            ) : (
              <Input
                readOnly
                value={choices.pianists.find(({ id }) => id === fields.pianistId)?.name ?? "Nobody"}
              />
            )}
          </Field>
          <Field label="Title" optional error={errors.title?.message} className="sm:col-span-2">
            <Input placeholder="such as Act one, sing-through" {...register("title")} />
          </Field>
        </div>
        <BlockList choices={choices} check={lastOf(check)} />
        <HandChanges choices={choices} check={lastOf(check)} />
      </div>
    </SideColumn>
  );
}
