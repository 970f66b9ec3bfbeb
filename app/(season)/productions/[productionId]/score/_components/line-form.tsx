"use client";

import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { RangeKeyboard } from "@/components/music/range-keyboard";
import { Checkbox } from "@/components/ui/checkbox";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { showToast } from "@/components/ui/toast-store";
import { parsePitch } from "@/lib/music/parse-pitch";
import { pitchName } from "@/lib/music/pitch-name";
import { writeLine } from "../actions";

type Props = {
  productionId: string;
  roleId: string;
  numberId: string;
  /** Fifths of the number's key, so that notes picked on the keyboard are spelled as there. */
  fifths: number;
  low: string;
  high: string;
  /** How many lines read from a score this one would replace. */
  replaces: number;
};

/** The lowest and highest note of a line, typed or picked on the keyboard. */
export function LineForm({ productionId, roleId, numberId, fifths, low, high, replaces }: Props) {
  const state = useActionForm({
    schema: () => import("@/lib/schemas/score").then((m) => m.writeLineSchema),
    action: writeLine,
    defaultValues: { productionId, roleId, numberId, low, high, replaceRead: false },
    onDone: () => {
      showToast({ title: "Line kept." });
    },
  });
  const { register, setValue, watch, formState } = state.form;
  const midi = (end: "low" | "high"): number | null => parsePitch(watch(end))?.midi ?? null;
  const write = (end: "low" | "high", pitch: number | null): void => {
    setValue(end, pitch === null ? "" : pitchName(pitch, { prefer: fifths }), {
      shouldDirty: true,
      shouldValidate: formState.isSubmitted,
    });
  };
  return (
    <ActionForm state={state} submitLabel={low === "" ? "Type the line in" : "Keep the line"}>
      <div className="grid grid-cols-2 items-start gap-4">
        <Field label="Lowest note" error={formState.errors.low?.message}>
          <Input placeholder="B♭3" autoComplete="off" {...register("low")} />
        </Field>
        <Field label="Highest note" error={formState.errors.high?.message}>
          <Input placeholder="F5" autoComplete="off" {...register("high")} />
        </Field>
      </div>
      <RangeKeyboard
        label="The line's range"
        value={{ low: midi("low"), high: midi("high") }}
        onChange={(picked) => {
          write("low", picked.low);
          write("high", picked.high);
        }}
      />
      {replaces > 0 && (
        <Checkbox
          label={
            replaces === 1
              ? "Replace the line that was read"
              : `Replace the ${String(replaces)} lines that were read`
          }
          note="How long the role sings on which note is then not known any more."
          {...register("replaceRead")}
        />
      )}
    </ActionForm>
  );
}
