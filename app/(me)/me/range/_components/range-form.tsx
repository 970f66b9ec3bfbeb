"use client";

import { useRouter } from "next/navigation";
import { Controller } from "react-hook-form";
import { claimRange } from "@/app/(me)/actions";
import { TellCompanies, type Told } from "@/app/(me)/_components/tell-companies";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { RangeKeyboard, type PickedRange } from "@/components/music/range-keyboard";
import { FieldGroup } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { showToast } from "@/components/ui/toast-store";

export type RangeFormProps = {
  records: readonly Told[];
  /** What was given last. */
  start: { range: PickedRange; comfortable: PickedRange };
};

export function RangeForm({ records, start }: RangeFormProps) {
  const router = useRouter();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/ranges").then((m) => m.claimRangeSchema),
    action: claimRange,
    defaultValues: { personIds: records.map((record) => record.personId), ...start },
    onDone: () => {
      showToast({ title: "Your range is on file." });
      router.push("/me");
    },
  });
  const { control, register, formState } = state.form;
  const { errors } = formState;
  return (
    <ActionForm state={state} submitLabel="Put it on file" className="max-w-none">
      <Notice tone="caution" title="Only what you can sing today without strain.">
        Do not push for this. A note that hurts, or that is there on good days only, does not belong
        in it; if your voice troubles you, a voice teacher or a doctor is who to ask.
      </Notice>
      <FieldGroup legend="What you sing" error={errors.range?.message}>
        <Controller
          control={control}
          name="range"
          render={({ field }) => (
            <RangeKeyboard
              label="What you sing"
              value={field.value}
              onChange={field.onChange}
              onBlur={field.onBlur}
            />
          )}
        />
      </FieldGroup>
      <FieldGroup
        legend="Where it is comfortable (optional)"
        hint="What you could sing for a whole evening."
        error={errors.comfortable?.message}
      >
        <Controller
          control={control}
          name="comfortable"
          render={({ field }) => (
            <RangeKeyboard
              label="Where it is comfortable"
              value={field.value}
              onChange={field.onChange}
              onBlur={field.onBlur}
            />
          )}
        />
      </FieldGroup>
      <TellCompanies
        records={records}
        register={register("personIds")}
        error={errors.personIds?.message}
      />
    </ActionForm>
  );
}
