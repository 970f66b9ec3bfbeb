"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Button } from "@/components/ui/button";
import { Checkbox } from "@/components/ui/checkbox";
import { Dialog } from "@/components/ui/dialog";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { showToast } from "@/components/ui/toast-store";
import { addSinger } from "../actions";

const EMPTY = {
  name: "",
  email: "",
  phone: "",
  pronouns: "",
  minor: false,
  asksFor: "",
  song: "",
  bars: "",
  low: "",
  high: "",
  notBefore: "",
  notAfter: "",
};

/** Signs one singer up by hand. */
export function AddSinger({ productionId }: { productionId: string }) {
  const [open, setOpen] = useState(false);
  return (
    <Dialog
      open={open}
      onOpenChange={setOpen}
      trigger={<Button>Add a singer</Button>}
      title="Add a singer"
      description="They become a person of the company and wait for a time. Nobody is written to yet."
    >
      <AddSingerForm productionId={productionId} onDone={() => setOpen(false)} />
    </Dialog>
  );
}

function AddSingerForm({ productionId, onDone }: { productionId: string; onDone: () => void }) {
  const router = useRouter();
  const state = useActionForm({
    schema: () => import("@/lib/schemas/auditions").then((m) => m.addSingerSchema),
    action: addSinger,
    defaultValues: { productionId, ...EMPTY },
    onDone: (_, form) => {
      showToast({ title: `${form.getValues("name")} is signed up.` });
      onDone();
      router.refresh();
    },
  });
  const { register, formState } = state.form;
  const message = (name: keyof typeof EMPTY): string | undefined => formState.errors[name]?.message;
  return (
    <ActionForm state={state} submitLabel="Sign up">
      <Field label="Name" error={message("name")}>
        <Input autoComplete="off" {...register("name")} />
      </Field>
      <Field label="E-mail" error={message("email")}>
        <Input type="email" autoComplete="off" {...register("email")} />
      </Field>
      <div className="grid gap-4 sm:grid-cols-2">
        <Field label="Phone" optional error={message("phone")}>
          <Input type="tel" autoComplete="off" {...register("phone")} />
        </Field>
        <Field label="Pronouns" optional error={message("pronouns")}>
          <Input {...register("pronouns")} />
        </Field>
        <Field label="Song" optional error={message("song")}>
          <Input {...register("song")} />
        </Field>
        <Field label="Bars" optional error={message("bars")}>
          <Input inputMode="numeric" {...register("bars")} />
        </Field>
        <Field label="Lowest note" optional hint="Like A3; C4 is middle C." error={message("low")}>
          <Input {...register("low")} />
        </Field>
        <Field label="Highest note" optional hint="Like E5." error={message("high")}>
          <Input {...register("high")} />
        </Field>
        <Field label="Not before" optional error={message("notBefore")}>
          <Input type="time" {...register("notBefore")} />
        </Field>
        <Field label="Not after" optional error={message("notAfter")}>
          <Input type="time" {...register("notAfter")} />
        </Field>
      </div>
      <Field label="Asks for" optional hint="A role, or “any”." error={message("asksFor")}>
        <Input {...register("asksFor")} />
      </Field>
      <Checkbox
        label="Under 18"
        note="Local rules on hours, licences and chaperones apply: ask whoever is responsible for them at your company."
        {...register("minor")}
      />
    </ActionForm>
  );
}
