"use client";

import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { showToast } from "@/components/ui/toast-store";
import { changeName } from "../actions";

export function NameForm({ name }: { name: string }) {
  const state = useActionForm({
    schema: () => import("@/lib/schemas/account").then((m) => m.changeNameSchema),
    action: changeName,
    defaultValues: { name },
    onDone: () => showToast({ title: "Your name is changed." }),
  });
  const { register, formState } = state.form;
  return (
    <ActionForm state={state} submitLabel="Save the name">
      <Field
        label="Your name"
        hint="As it greets you and signs what you send. Each company keeps its own record beside it."
        error={formState.errors.name?.message}
      >
        <Input autoComplete="name" {...register("name")} />
      </Field>
    </ActionForm>
  );
}
