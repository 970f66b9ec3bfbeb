"use client";

import { useRouter } from "next/navigation";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { showToast } from "@/components/ui/toast-store";
import type { SignUpListed } from "@/lib/data/auditions/sign-ups";
import { changeSignUp, relistSignUp, withdrawSignUp } from "../actions";
import { StateMark } from "./state-mark";

/** What one singer brings and asks for, and whether they come at all. */
export function ChangeSignUp({
  productionId,
  row,
  onClose,
}: {
  productionId: string;
  row: SignUpListed;
  onClose: () => void;
}) {
  const router = useRouter();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/auditions").then((m) => m.changeSignUpSchema),
    action: changeSignUp,
    defaultValues: {
      productionId,
      signUpId: row.id,
      version: row.version,
      song: row.song ?? "",
      bars: row.bars === null ? "" : String(row.bars),
      asksFor: row.asksFor ?? "",
      notBefore: row.notBefore ?? "",
      notAfter: row.notAfter ?? "",
    },
    onDone: () => {
      showToast({ title: `${row.name} is changed.` });
      onClose();
      router.refresh();
    },
  });
  const { register, formState } = state.form;
  const which = { productionId, signUpId: row.id };

  async function act(work: typeof withdrawSignUp, done: string) {
    const result = await work(which);
    showToast(result.ok ? { title: done } : { title: result.error.message, tone: "error" });
    if (!result.ok) return;
    onClose();
    router.refresh();
  }

  const gone = row.state === "withdrawn" || row.state === "declined";
  return (
    <Dialog
      open
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
      title={row.name}
      description={row.email ?? "No e-mail address shown"}
    >
      <StateMark state={row.state} className="text-sm" />
      <ActionForm state={state} submitLabel="Save">
        <Field label="Song" optional error={formState.errors.song?.message}>
          <Input {...register("song")} />
        </Field>
        <Field label="Bars" optional error={formState.errors.bars?.message}>
          <Input inputMode="numeric" className="max-w-28" {...register("bars")} />
        </Field>
        <Field
          label="Asks for"
          optional
          hint="A role, or “any”."
          error={formState.errors.asksFor?.message}
        >
          <Input {...register("asksFor")} />
        </Field>
        <div className="flex flex-wrap gap-4">
          <Field label="Not before" optional error={formState.errors.notBefore?.message}>
            <Input type="time" className="w-36" {...register("notBefore")} />
          </Field>
          <Field label="Not after" optional error={formState.errors.notAfter?.message}>
            <Input type="time" className="w-36" {...register("notAfter")} />
          </Field>
        </div>
      </ActionForm>
      <div className="border-t border-rule pt-4">
        {gone ? (
          <Button onClick={() => void act(relistSignUp, `${row.name} is back on the list.`)}>
            Put back on the list
          </Button>
        ) : (
          <>
            <Button
              kind="danger"
              onClick={() =>
                void act(withdrawSignUp, `${row.name} is withdrawn; the time is free.`)
              }
            >
              {row.name} does not come
            </Button>
            <p className="mt-2 text-sm text-ink-2">
              Frees the time. Nobody is written to, and they can be put back on the list.
            </p>
          </>
        )}
      </div>
    </Dialog>
  );
}
