"use client";

import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { signInWithPassword } from "../actions";

/** For those who set a password: folded away, because most never need it. */
export function PasswordForm({ to }: { to: string }) {
  const state = useActionForm({
    schema: () => import("@/lib/schemas/sign-in").then((m) => m.passwordSignInSchema),
    action: signInWithPassword,
    defaultValues: { email: "", password: "", to },
  });
  const { register, formState } = state.form;
  return (
    <details className="border-t border-rule">
      <summary className="flex min-h-11 items-center py-2 font-bold text-smalt">
        I have a password
      </summary>
      <div className="pt-2">
        <ActionForm state={state} submitLabel="Sign in" pendingLabel="Signing in">
          <Field label="E-mail" error={formState.errors.email?.message}>
            <Input
              type="email"
              autoComplete="username"
              autoCapitalize="none"
              spellCheck={false}
              {...register("email")}
            />
          </Field>
          <Field label="Password" error={formState.errors.password?.message}>
            <Input type="password" autoComplete="current-password" {...register("password")} />
          </Field>
        </ActionForm>
      </div>
    </details>
  );
}
