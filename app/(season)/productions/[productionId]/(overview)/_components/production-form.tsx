"use client";

import { useRouter } from "next/navigation";
import { useEffect } from "react";
import { changeProduction } from "@/app/(season)/actions";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { SectionTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Notice } from "@/components/ui/notice";
import { Select } from "@/components/ui/select";
import { showToast } from "@/components/ui/toast-store";
import type { ProductionListed } from "@/lib/data/productions";
import { dayOfYear } from "@/lib/format-dates";
import { STAGES, stageName } from "../../../../_components/stage-name";

export type ProductionFormProps = {
  productionId: string;
  version: number;
  title: string;
  stage: ProductionListed["stage"];
  opensOn: string | null;
  closesOn: string | null;
};

const valuesOf = ({ opensOn, closesOn, ...rest }: ProductionFormProps) => ({
  ...rest,
  opensOn: opensOn ?? "",
  closesOn: closesOn ?? "",
});

function saysNow({ title, stage, opensOn, closesOn }: ProductionFormProps): string {
  return [
    title,
    stageName(stage).toLowerCase(),
    ...(opensOn === null ? [] : [`opens ${dayOfYear(opensOn)}`]),
    ...(closesOn === null ? [] : [`closes ${dayOfYear(closesOn)}`]),
  ].join(", ");
}

/** Title, stage and dates. When someone else saved meanwhile, both are shown and the person chooses. */
export function ProductionForm(props: ProductionFormProps) {
  const router = useRouter();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/productions").then((m) => m.changeProductionSchema),
    action: async (input: Parameters<typeof changeProduction>[0]) => {
      const result = await changeProduction(input);
      // What the other one wrote comes with the page.
      if (!result.ok && result.error.code === "stale") router.refresh();
      return result;
    },
    defaultValues: valuesOf(props),
    onDone: (_, form) => {
      const kept = form.getValues();
      form.reset({ ...kept, version: Number(kept.version) + 1 });
      showToast({ title: "The production is changed." });
      router.refresh();
    },
  });
  const { register, formState, reset, setValue, getValues } = state.form;
  const { errors, isDirty } = formState;
  const behind = props.version > Number(getValues("version"));

  useEffect(() => {
    // Someone else saved: an untouched form follows along.
    if (behind && !isDirty && !state.pending) reset(valuesOf(props));
  }, [behind, isDirty, state.pending, reset, props]);

  return (
    <section aria-labelledby="change">
      <SectionTitle id="change" ruled>
        Change it
      </SectionTitle>
      <ActionForm state={state} submitLabel="Save" className="mt-4">
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
                    setValue("version", props.version);
                    void state.submit();
                  }}
                >
                  Save mine
                </Button>
                <Button size="small" onClick={() => reset(valuesOf(props))}>
                  Take theirs
                </Button>
              </>
            }
          >
            It now says: {saysNow(props)}. What you typed is still below.
          </Notice>
        )}
        <Field label="Title" error={errors.title?.message}>
          <Input {...register("title")} maxLength={160} autoComplete="off" />
        </Field>
        <Field label="Stage" error={errors.stage?.message}>
          <Select {...register("stage")}>
            {Object.entries(STAGES).map(([value, name]) => (
              <option key={value} value={value}>
                {name}
              </option>
            ))}
          </Select>
        </Field>
        <Field label="Opens" optional error={errors.opensOn?.message}>
          <Input type="date" {...register("opensOn")} />
        </Field>
        <Field label="Closes" optional error={errors.closesOn?.message}>
          <Input type="date" {...register("closesOn")} />
        </Field>
      </ActionForm>
    </section>
  );
}
