"use client";

import { useRouter } from "next/navigation";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Field } from "@/components/ui/field";
import { Textarea } from "@/components/ui/textarea";
import { issueSheet } from "../actions";

type Props = {
  productionId: string;
  localDate: string;
  seen: string;
  number: number;
  concerns: number;
};

/** Sends the sheet as it stands, with notes for everyone. */
export function IssueForm({ productionId, localDate, seen, number, concerns }: Props) {
  const router = useRouter();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/sheets").then((m) => m.issueSheetSchema),
    // What was seen is what the page shows now, also after it was loaded again.
    action: (input) => issueSheet({ ...input, seen }),
    defaultValues: { productionId, localDate, seen, notes: "" },
    onDone: ({ issueId }) =>
      router.push(`/productions/${productionId}/call-sheets/issues/${issueId}`),
  });
  return (
    <ActionForm state={state} submitLabel={`Issue ${String(number)}`} pendingLabel="Sending">
      <Field
        label="Notes for everyone"
        optional
        hint="One a line, such as what to bring."
        error={state.form.formState.errors.notes?.message}
      >
        <Textarea rows={3} {...state.form.register("notes")} />
      </Field>
      <p className="text-sm text-ink-2">
        {concerns === 1 ? "One person is" : `${String(concerns)} people are`} told by e-mail. An
        issue cannot be altered afterwards; a change makes the next one.
      </p>
    </ActionForm>
  );
}
