"use client";

import { FormError } from "@/components/forms/form-error";
import { useActionForm } from "@/components/forms/use-action-form";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { PendingButton } from "@/components/ui/pending-button";
import { requestLink } from "../actions";

export type LinkFormProps = {
  /** Where to go once signed in; empty for one's own first page. */
  to?: string;
  /** What was typed before the page was awake. */
  email?: string;
  /** Keeps the label for screen readers, where the page around says what the field is. */
  labelHidden?: boolean;
};

/** Sign-in by one field: an address, and a link comes. */
export function LinkForm({ to = "", email = "", labelHidden = false }: LinkFormProps) {
  const state = useActionForm({
    schema: () => import("@/lib/schemas/sign-in").then((m) => m.requestLinkSchema),
    action: requestLink,
    defaultValues: { email, to },
  });
  const { register, formState } = state.form;
  return (
    <form
      noValidate
      // Pressed before the page is awake, the browser sends it itself: the sign-in page then has what was typed.
      method="get"
      action="/sign-in"
      onSubmit={(event) => void state.submit(event)}
      className="flex w-full flex-col gap-3"
    >
      {to !== "" && <input type="hidden" name="to" value={to} />}
      <div className="flex flex-wrap items-end gap-x-3 gap-y-3">
        <Field
          label="Your e-mail"
          labelHidden={labelHidden}
          error={formState.errors.email?.message}
          className="flex-[1_1_16rem]"
        >
          <Input
            type="email"
            autoComplete="email"
            inputMode="email"
            autoCapitalize="none"
            spellCheck={false}
            placeholder="Your e-mail"
            className="min-h-13 md:min-h-13"
            {...register("email")}
          />
        </Field>
        <PendingButton
          kind="primary"
          size="large"
          pending={state.pending}
          pendingLabel="Sending"
          className="max-sm:w-full"
        >
          Send me a link
        </PendingButton>
      </div>
      <FormError message={state.formError} />
    </form>
  );
}
