"use client";

import { useWatch } from "react-hook-form";
import { addConflict, removeConflicts } from "@/app/(me)/actions";
import { TellCompanies, type Told } from "@/app/(me)/_components/tell-companies";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { SectionTitle } from "@/components/layout/page-title";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { RadioGroup } from "@/components/ui/radio-group";
import { showToast } from "@/components/ui/toast-store";

const SPANS = [
  { value: "day", label: "One day" },
  { value: "days", label: "Several days" },
  { value: "part", label: "Part of a day" },
];

export function ConflictForm({ records, today }: { records: readonly Told[]; today: string }) {
  const empty = { from: "", to: "", timeFrom: "", timeTo: "", reason: "" };
  const state = useActionForm({
    schema: () => import("@/lib/schemas/conflicts").then((m) => m.addConflictSchema),
    action: addConflict,
    defaultValues: { personIds: records.map((record) => record.personId), span: "day", ...empty },
    onDone: ({ conflictIds }, form) => {
      // The next date is often of the same kind and for the same companies.
      form.reset({ ...form.getValues(), ...empty });
      showToast({
        title: "They have been told.",
        undo: async () => {
          const result = await removeConflicts({ conflictIds });
          showToast(
            result.ok ? { title: "Taken back." } : { title: result.error.message, tone: "error" },
          );
        },
      });
    },
  });
  const { register, control, formState } = state.form;
  const { errors } = formState;
  const span = useWatch({ control, name: "span" });
  return (
    <section aria-labelledby="add" className="mt-10">
      <SectionTitle id="add">Add a date</SectionTitle>
      <ActionForm state={state} submitLabel="Tell them">
        <RadioGroup
          legend="You can’t come on"
          options={SPANS}
          error={errors.span?.message}
          {...register("span")}
        />
        <div className="grid gap-4 sm:grid-cols-2">
          <Field label={span === "days" ? "First day" : "Day"} error={errors.from?.message}>
            <Input type="date" min={today} {...register("from")} />
          </Field>
          {span === "days" && (
            <Field label="Last day" error={errors.to?.message}>
              <Input type="date" min={today} {...register("to")} />
            </Field>
          )}
        </div>
        {span === "part" && (
          <div className="grid grid-cols-2 gap-4">
            <Field label="From" error={errors.timeFrom?.message}>
              <Input type="time" {...register("timeFrom")} />
            </Field>
            <Field label="To" error={errors.timeTo?.message}>
              <Input type="time" {...register("timeTo")} />
            </Field>
          </div>
        )}
        <Field
          label="Reason"
          optional
          hint="Read by the music team and the stage manager. You need not give one."
          error={errors.reason?.message}
        >
          <Input maxLength={160} {...register("reason")} />
        </Field>
        <TellCompanies
          records={records}
          register={register("personIds")}
          error={errors.personIds?.message}
        />
      </ActionForm>
    </section>
  );
}
