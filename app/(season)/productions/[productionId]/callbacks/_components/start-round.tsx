"use client";

import { useRouter } from "next/navigation";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { startRound } from "../actions";

/** Begins a round of callbacks by its name. */
export function StartRound({
  productionId,
  title = "Callbacks",
  onDone,
}: {
  productionId: string;
  /** The name it begins with. */
  title?: string;
  onDone?: () => void | Promise<void>;
}) {
  const router = useRouter();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/callbacks").then((m) => m.startRoundSchema),
    action: startRound,
    defaultValues: { productionId, title },
    onDone: async () => {
      await onDone?.();
      router.refresh();
    },
  });
  const { register, formState } = state.form;
  return (
    <ActionForm state={state} submitLabel="Begin the round" pendingLabel="Beginning">
      <Field
        label="Name of the round"
        hint="Those called back read it, such as “Callbacks” or “Second callbacks”."
        error={formState.errors.title?.message}
      >
        <Input {...register("title")} maxLength={120} autoComplete="off" className="max-w-sm" />
      </Field>
    </ActionForm>
  );
}
