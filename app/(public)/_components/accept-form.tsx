"use client";

import { FormError } from "@/components/forms/form-error";
import { useActionForm } from "@/components/forms/use-action-form";
import { PendingButton } from "@/components/ui/pending-button";
import { acceptInvitation } from "../actions";

export function AcceptForm({ token, to, label }: { token: string; to: string; label: string }) {
  const state = useActionForm({
    schema: () => import("@/lib/schemas/sign-in").then((m) => m.acceptInvitationSchema),
    action: acceptInvitation,
    defaultValues: { token, to },
  });
  return (
    <form noValidate onSubmit={(event) => void state.submit(event)} className="flex flex-col gap-3">
      <FormError message={state.formError} />
      <PendingButton
        kind="primary"
        size="large"
        pending={state.pending}
        pendingLabel="Signing in"
        className="self-start max-sm:w-full"
      >
        {label}
      </PendingButton>
    </form>
  );
}
