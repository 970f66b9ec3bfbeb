"use client";

import type { UseFormRegister } from "react-hook-form";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { Dialog } from "@/components/ui/dialog";
import { showToast } from "@/components/ui/toast-store";
import { formatLength } from "@/lib/score/number-length";
import type { ScoreNumber } from "@/lib/score/score-view";
import { addNumber, changeNumber } from "../actions";
import type { LazyDialogProps } from "./lazy-dialog-button";
import { NumberFields } from "./number-fields";
import type { NumberFieldValues } from "./number-fields";

const text = (value: string | number | null): string => (value === null ? "" : String(value));

function valuesOf(number: ScoreNumber | null): NumberFieldValues {
  return {
    label: number?.label ?? "",
    title: number?.title ?? "",
    key: text(number?.keyName ?? null),
    keyFifths: text(number?.keyFifths ?? null),
    metre: text(number?.metre ?? null),
    tempo: text(number?.tempo ?? null),
    bars: text(number?.bars ?? null),
    length: number?.seconds == null ? "" : formatLength(number.seconds),
  };
}

type Props = LazyDialogProps & { productionId: string; number: ScoreNumber | null };

/** Adds a number, or changes one. */
export default function NumberDialog({ productionId, number, ...dialog }: Props) {
  const close = () => {
    dialog.onOpenChange(false);
  };
  return (
    <Dialog
      {...dialog}
      title={number ? `Change ${number.label}, ${number.title}` : "Add a number"}
      description={
        number
          ? "What is read or typed of its lines stays."
          : "It comes last in the running order; it can be moved."
      }
    >
      {number ? (
        <ChangeForm productionId={productionId} number={number} onDone={close} />
      ) : (
        <AddForm productionId={productionId} onDone={close} />
      )}
    </Dialog>
  );
}

function AddForm({ productionId, onDone }: { productionId: string; onDone: () => void }) {
  const state = useActionForm({
    schema: () => import("@/lib/schemas/score").then((m) => m.addNumberSchema),
    action: addNumber,
    defaultValues: { productionId, ...valuesOf(null) },
    onDone: (_, form) => {
      showToast({ title: `Number ${form.getValues("label")} added.` });
      onDone();
    },
  });
  return (
    <ActionForm state={state} submitLabel="Add the number">
      <NumberFields
        register={state.form.register as unknown as UseFormRegister<NumberFieldValues>}
        errors={state.form.formState.errors}
      />
    </ActionForm>
  );
}

function ChangeForm({
  productionId,
  number,
  onDone,
}: {
  productionId: string;
  number: ScoreNumber;
  onDone: () => void;
}) {
  const state = useActionForm({
    schema: () => import("@/lib/schemas/score").then((m) => m.changeNumberSchema),
    action: changeNumber,
    defaultValues: {
      productionId,
      numberId: number.id,
      version: number.version,
      ...valuesOf(number),
    },
    onDone: () => {
      showToast({ title: "Changed." });
      onDone();
    },
  });
  return (
    <ActionForm state={state} submitLabel="Keep the changes">
      <NumberFields
        register={state.form.register as unknown as UseFormRegister<NumberFieldValues>}
        errors={state.form.formState.errors}
      />
    </ActionForm>
  );
}
