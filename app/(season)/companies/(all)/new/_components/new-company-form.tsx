"use client";

import { useRouter } from "next/navigation";
import { useEffect } from "react";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { createCompany } from "../../../../actions";

/** Name, time zone and paper of a new company; the zone begins as the browser's own. */
export function NewCompanyForm({ zones }: { zones: readonly string[] }) {
  const router = useRouter();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/productions").then((m) => m.createCompanySchema),
    action: createCompany,
    defaultValues: { name: "", zone: "Europe/London", paper: "A4" },
    onDone: ({ companyId }) => {
      router.push(`/productions/new?company=${companyId}`);
    },
  });
  const { register, formState, setValue, getFieldState } = state.form;
  const { errors } = formState;

  useEffect(() => {
    const own = Intl.DateTimeFormat().resolvedOptions().timeZone;
    if (zones.includes(own) && !getFieldState("zone").isDirty) setValue("zone", own);
  }, [zones, setValue, getFieldState]);

  return (
    <ActionForm state={state} submitLabel="Start the company" pendingLabel="Starting">
      <Field label="Name" error={errors.name?.message}>
        <Input maxLength={160} autoComplete="organization" {...register("name")} />
      </Field>
      <Field
        label="Time zone"
        hint="Calls and auditions are at this clock’s time, also for people who look from elsewhere."
        error={errors.zone?.message}
      >
        <Select {...register("zone")}>
          {zones.map((zone) => (
            <option key={zone} value={zone}>
              {zone.replaceAll("_", " ")}
            </option>
          ))}
        </Select>
      </Field>
      <Field label="Paper" hint="What call sheets are printed on." error={errors.paper?.message}>
        <Select {...register("paper")}>
          <option value="A4">A4</option>
          <option value="Letter">Letter</option>
        </Select>
      </Field>
    </ActionForm>
  );
}
