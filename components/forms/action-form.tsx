"use client";

import type { ReactNode } from "react";
import type { FieldValues } from "react-hook-form";
import { PendingButton } from "@/components/ui/pending-button";
import { cx } from "@/components/ui/cx";
import { FormError } from "./form-error";
import type { ActionForm as ActionFormState } from "./use-action-form";

export type ActionFormProps<Input extends FieldValues, Output, Data> = {
  /** What useActionForm gave. */
  state: ActionFormState<Input, Output, Data>;
  children: ReactNode;
  /** The act in a verb: "Add the role". */
  submitLabel: string;
  pendingLabel?: string;
  /** Stands beside the submit button, for instance a button to leave. */
  beside?: ReactNode;
  className?: string;
};

/** The form element around fields: its message above the button, the button at work while it sends. */
export function ActionForm<Input extends FieldValues, Output, Data>({
  state,
  children,
  submitLabel,
  pendingLabel = "Saving",
  beside,
  className,
}: ActionFormProps<Input, Output, Data>) {
  return (
    <form
      noValidate
      // Pressed before the page is awake, the browser sends it itself: never into the address.
      method="post"
      onSubmit={(event) => {
        void state.submit(event);
      }}
      className={cx("flex w-full max-w-xl min-w-0 flex-col gap-4", className)}
    >
      {children}
      <FormError message={state.formError} />
      <div className="flex flex-wrap items-center gap-3">
        <PendingButton kind="primary" pending={state.pending} pendingLabel={pendingLabel}>
          {submitLabel}
        </PendingButton>
        {beside}
      </div>
    </form>
  );
}
