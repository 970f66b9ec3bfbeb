"use client";

import type { FieldErrors, UseFormRegister } from "react-hook-form";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Dialog } from "@/components/ui/dialog";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { Textarea } from "@/components/ui/textarea";
import { showToast } from "@/components/ui/toast-store";
import { ROLE_KIND_NAMES } from "@/lib/score/review-types";
import type { RoleKind } from "@/lib/score/review-types";
import type { ScoreRole } from "@/lib/score/score-view";
import { addRole, changeRole } from "../actions";
import type { LazyDialogProps } from "./lazy-dialog-button";

type RoleFieldValues = {
  name: string;
  kind: RoleKind;
  needed: string;
  covers: string;
  about: string;
};

function valuesOf(role: ScoreRole | null): RoleFieldValues {
  return {
    name: role?.name ?? "",
    kind: role?.kind ?? "principal",
    needed: String(role?.needed ?? 1),
    covers: String(role?.covers ?? 0),
    about: role?.about ?? "",
  };
}

type Props = LazyDialogProps & { productionId: string; role: ScoreRole | null };

/** Adds a role, or changes one. */
export default function RoleDialog({ productionId, role, ...dialog }: Props) {
  const close = () => {
    dialog.onOpenChange(false);
  };
  return (
    <Dialog
      {...dialog}
      title={role ? `Change ${role.name}` : "Add a role"}
      description="A part in the show. What it sings is read from a score or typed in afterwards."
    >
      {role ? (
        <ChangeForm productionId={productionId} role={role} onDone={close} />
      ) : (
        <AddForm productionId={productionId} onDone={close} />
      )}
    </Dialog>
  );
}

function AddForm({ productionId, onDone }: { productionId: string; onDone: () => void }) {
  const state = useActionForm({
    schema: () => import("@/lib/schemas/score").then((m) => m.addRoleSchema),
    action: addRole,
    defaultValues: { productionId, ...valuesOf(null) },
    onDone: (_, form) => {
      showToast({ title: `${form.getValues("name")} added.` });
      onDone();
    },
  });
  return (
    <ActionForm state={state} submitLabel="Add the role">
      <RoleFields
        register={state.form.register as unknown as UseFormRegister<RoleFieldValues>}
        errors={state.form.formState.errors as FieldErrors<RoleFieldValues>}
      />
    </ActionForm>
  );
}

function ChangeForm({
  productionId,
  role,
  onDone,
}: {
  productionId: string;
  role: ScoreRole;
  onDone: () => void;
}) {
  const state = useActionForm({
    schema: () => import("@/lib/schemas/score").then((m) => m.changeRoleSchema),
    action: changeRole,
    defaultValues: { productionId, roleId: role.id, version: role.version, ...valuesOf(role) },
    onDone: () => {
      showToast({ title: "Changed." });
      onDone();
    },
  });
  return (
    <ActionForm state={state} submitLabel="Keep the changes">
      <RoleFields
        register={state.form.register as unknown as UseFormRegister<RoleFieldValues>}
        errors={state.form.formState.errors as FieldErrors<RoleFieldValues>}
      />
    </ActionForm>
  );
}

function RoleFields({
  register,
  errors,
}: {
  register: UseFormRegister<RoleFieldValues>;
  errors: FieldErrors<RoleFieldValues>;
}) {
  return (
    <>
      <Field label="Name" error={errors.name?.message}>
        <Input autoComplete="off" {...register("name")} />
      </Field>
      <div className="grid grid-cols-2 items-start gap-4 sm:grid-cols-3">
        <Field label="Kind" error={errors.kind?.message} className="max-sm:col-span-2">
          <Select {...register("kind")}>
            {Object.entries(ROLE_KIND_NAMES).map(([kind, name]) => (
              <option key={kind} value={kind}>
                {name}
              </option>
            ))}
          </Select>
        </Field>
        <Field label="People needed" error={errors.needed?.message}>
          <Input inputMode="numeric" autoComplete="off" {...register("needed")} />
        </Field>
        <Field label="Covers" error={errors.covers?.message}>
          <Input inputMode="numeric" autoComplete="off" {...register("covers")} />
        </Field>
      </div>
      <Field label="About" optional error={errors.about?.message}>
        <Textarea rows={3} {...register("about")} />
      </Field>
    </>
  );
}
