"use client";

import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { showToast } from "@/components/ui/toast-store";
import { removePassword, setPassword } from "../actions";

export type PasswordPartProps = {
  email: string;
  isSet: boolean;
  /** Whether a change needs the present password: one is set, and this session is older than an hour. */
  asksForCurrent: boolean;
};

export function PasswordPart({ email, isSet, asksForCurrent }: PasswordPartProps) {
  const state = useActionForm({
    schema: () => import("@/lib/schemas/account").then((m) => m.setPasswordSchema),
    action: setPassword,
    defaultValues: { current: "", password: "" },
    onDone: (_data, form) => {
      form.reset();
      showToast({
        title: isSet
          ? "Password changed. Other sessions are ended."
          : "Password set. Other sessions are ended.",
      });
    },
  });
  const { register, formState } = state.form;
  return (
    <>
      <p className="mb-4 max-w-prose text-ink-2">
        {isSet
          ? "You can sign in with a password or with a link by e-mail. Changing it ends your other sessions."
          : "You sign in with a link by e-mail. A password is for where mail is slow to reach you."}
      </p>
      <ActionForm
        state={state}
        submitLabel={isSet ? "Change the password" : "Set a password"}
        beside={isSet && <RemovePassword asksForCurrent={asksForCurrent} />}
      >
        <input type="email" autoComplete="username" value={email} readOnly hidden />
        {asksForCurrent && (
          <Field label="Present password" error={formState.errors.current?.message}>
            <Input type="password" autoComplete="current-password" {...register("current")} />
          </Field>
        )}
        <Field
          label="New password"
          hint="At least 12 characters; a few words that do not belong together."
          error={formState.errors.password?.message}
        >
          <Input type="password" autoComplete="new-password" {...register("password")} />
        </Field>
      </ActionForm>
    </>
  );
}

function RemovePassword({ asksForCurrent }: { asksForCurrent: boolean }) {
  return (
    <Dialog
      title="Remove the password?"
      description="From then on you sign in with a link by e-mail only. Your other sessions are ended; you can set a password again any time."
      trigger={<Button>Remove it</Button>}
    >
      <RemoveForm asksForCurrent={asksForCurrent} />
    </Dialog>
  );
}

function RemoveForm({ asksForCurrent }: { asksForCurrent: boolean }) {
  const state = useActionForm({
    schema: () => import("@/lib/schemas/account").then((m) => m.removePasswordSchema),
    action: removePassword,
    defaultValues: { current: "" },
    onDone: () => showToast({ title: "The password is removed." }),
  });
  const { register, formState } = state.form;
  return (
    <ActionForm state={state} submitLabel="Remove the password">
      {asksForCurrent && (
        <Field label="Present password" error={formState.errors.current?.message}>
          <Input type="password" autoComplete="current-password" {...register("current")} />
        </Field>
      )}
    </ActionForm>
  );
}
