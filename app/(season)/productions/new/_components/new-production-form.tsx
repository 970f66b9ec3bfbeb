"use client";

import { useRouter } from "next/navigation";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { createProduction } from "../../../actions";

/** Title and dates of a new production; the company is asked only where there are several. */
export function NewProductionForm({
  companies,
  companyId,
}: {
  companies: readonly { id: string; name: string }[];
  companyId: string;
}) {
  const router = useRouter();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/productions").then((m) => m.createProductionSchema),
    action: createProduction,
    defaultValues: { companyId, title: "", opensOn: "", closesOn: "" },
    onDone: ({ productionId }) => {
      router.push(`/productions/${productionId}/score`);
    },
  });
  const { register, formState } = state.form;
  const { errors } = formState;
  return (
    <ActionForm state={state} submitLabel="Make the production" pendingLabel="Making it">
      {companies.length > 1 && (
        <Field label="Company" error={errors.companyId?.message}>
          <Select {...register("companyId")}>
            {companies.map((company) => (
              <option key={company.id} value={company.id}>
                {company.name}
              </option>
            ))}
          </Select>
        </Field>
      )}
      <Field label="Title" error={errors.title?.message}>
        <Input maxLength={160} autoComplete="off" {...register("title")} />
      </Field>
      <div className="grid gap-4 sm:grid-cols-2">
        <Field label="First night" optional error={errors.opensOn?.message}>
          <Input type="date" {...register("opensOn")} />
        </Field>
        <Field label="Last night" optional error={errors.closesOn?.message}>
          <Input type="date" {...register("closesOn")} />
        </Field>
      </div>
    </ActionForm>
  );
}
