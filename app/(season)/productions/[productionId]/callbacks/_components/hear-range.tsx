"use client";

import { useQueryClient } from "@tanstack/react-query";
import { Controller } from "react-hook-form";
import { VoiceCaution } from "@/components/casting/voice-caution";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { RangeKeyboard } from "@/components/music/range-keyboard";
import { Dialog } from "@/components/ui/dialog";
import { FieldGroup } from "@/components/ui/field";
import { showToast } from "@/components/ui/toast-store";
import { callbacksQuery, type DraftSinger } from "@/lib/client/callbacks";
import { pitchName } from "@/lib/music/pitch-name";
import { hearRange } from "../../auditions/actions";

/** The range heard from one singer, over the page; the fits follow from it. */
export default function HearRange({
  productionId,
  singer,
  onClose,
}: {
  productionId: string;
  singer: DraftSinger;
  onClose: () => void;
}) {
  const client = useQueryClient();
  const { range } = singer;
  const state = useActionForm({
    schema: () => import("@/lib/schemas/ranges").then((m) => m.hearRangeSchema),
    action: hearRange,
    defaultValues: {
      productionId,
      personId: singer.personId,
      low: range?.low ?? null,
      high: range?.high ?? null,
      comfortableLow: range?.comfortableLow ?? null,
      comfortableHigh: range?.comfortableHigh ?? null,
    },
    onDone: async () => {
      await client.invalidateQueries({ queryKey: callbacksQuery(productionId).queryKey });
      showToast({ title: `The range heard from ${singer.name} is written down.` });
      onClose();
    },
  });
  const { control, setValue, watch, formState } = state.form;
  const pitch = (value: unknown): number | null => (typeof value === "number" ? value : null);
  const [low, high, comfortableLow, comfortableHigh] = watch([
    "low",
    "high",
    "comfortableLow",
    "comfortableHigh",
  ]).map(pitch);
  const wrong = formState.errors;
  return (
    <Dialog
      open
      onOpenChange={onClose}
      title={`Range heard from ${singer.name}`}
      description={
        range
          ? `On file: ${pitchName(range.low)}–${pitchName(range.high)}, ${range.kind}.`
          : "No range is on file yet."
      }
    >
      <ActionForm state={state} submitLabel="Write it down">
        <Controller
          control={control}
          name="low"
          render={({ field }) => (
            <FieldGroup
              legend="Lowest to highest note heard"
              error={
                (wrong.low ?? wrong.high) && (low == null || high == null)
                  ? "Tap the lowest note and the highest."
                  : (wrong.low?.message ?? wrong.high?.message)
              }
            >
              <RangeKeyboard
                label="Lowest to highest note heard"
                value={{ low: low ?? null, high: high ?? null }}
                onBlur={field.onBlur}
                onChange={(picked) => {
                  setValue("low", picked.low, { shouldDirty: true });
                  setValue("high", picked.high, { shouldDirty: true });
                }}
              />
            </FieldGroup>
          )}
        />
        <FieldGroup
          legend="Comfortable part (optional)"
          error={wrong.comfortableLow?.message ?? wrong.comfortableHigh?.message}
        >
          <RangeKeyboard
            label="Comfortable part"
            value={{ low: comfortableLow ?? null, high: comfortableHigh ?? null }}
            onChange={(picked) => {
              setValue("comfortableLow", picked.low, { shouldDirty: true });
              setValue("comfortableHigh", picked.high, { shouldDirty: true });
            }}
          />
        </FieldGroup>
        <VoiceCaution minor={singer.minor} />
      </ActionForm>
    </Dialog>
  );
}
