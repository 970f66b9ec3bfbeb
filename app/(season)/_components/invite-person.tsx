"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { showToast } from "@/components/ui/toast-store";
import type { ActionResult } from "@/lib/errors";
import { POSITION_NAMES } from "@/lib/permissions/position-kinds";
import type { PositionKind } from "@/lib/permissions/types";
import type { invitePersonSchema } from "@/lib/schemas/people";
import type { z } from "zod";

export type Invite = (
  input: z.input<typeof invitePersonSchema>,
) => Promise<ActionResult<{ personId: string }>>;

/** Where a position is given: a production, or the company itself (`productionId` null). */
export type Into = { companyId: string; productionId: string | null };

export type InvitePersonProps = {
  into: Into;
  /** The positions to choose from. */
  kinds: readonly PositionKind[];
  invite: Invite;
  description: string;
};

/** Invites someone by e-mail into a position. */
export function InvitePerson(props: InvitePersonProps) {
  const [open, setOpen] = useState(false);
  return (
    <Dialog
      open={open}
      onOpenChange={setOpen}
      trigger={<Button kind="primary">Invite someone</Button>}
      title="Invite someone"
      description={props.description}
    >
      <InviteForm {...props} onDone={() => setOpen(false)} />
    </Dialog>
  );
}

function InviteForm({ into, kinds, invite, onDone }: InvitePersonProps & { onDone: () => void }) {
  const router = useRouter();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/people").then((m) => m.invitePersonSchema),
    action: invite,
    defaultValues: { ...into, name: "", email: "", phone: "", kind: kinds.at(-1) ?? "actor" },
    onDone: (_, form) => {
      showToast({ title: `The invitation to ${form.getValues("name")} is on its way.` });
      onDone();
      router.refresh();
    },
  });
  const { register, formState } = state.form;
  const { errors } = formState;
  return (
    <ActionForm state={state} submitLabel="Send the invitation" pendingLabel="Sending">
      <Field label="Name" error={errors.name?.message}>
        <Input autoComplete="off" maxLength={160} {...register("name")} />
      </Field>
      <Field label="E-mail" error={errors.email?.message}>
        <Input
          type="email"
          autoComplete="off"
          autoCapitalize="none"
          spellCheck={false}
          {...register("email")}
        />
      </Field>
      <Field label="Phone" optional error={errors.phone?.message}>
        <Input type="tel" autoComplete="off" maxLength={40} {...register("phone")} />
      </Field>
      <Field label="Position" error={errors.kind?.message}>
        <Select {...register("kind")}>
          {kinds.map((kind) => (
            <option key={kind} value={kind}>
              {POSITION_NAMES[kind]}
            </option>
          ))}
        </Select>
      </Field>
    </ActionForm>
  );
}
