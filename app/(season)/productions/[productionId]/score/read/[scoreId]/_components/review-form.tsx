"use client";

import Link from "next/link";
import { useRouter } from "next/navigation";
import type { UseFormReturn } from "react-hook-form";
import { ActionForm } from "@/components/forms/action-form";
import { useActionForm } from "@/components/forms/use-action-form";
import { SectionTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Select } from "@/components/ui/select";
import { showToast } from "@/components/ui/toast-store";
import { signatureInWords } from "@/lib/score/keys";
import type { PartPlan, ScoreReview } from "@/lib/score/review-types";
import { scaleOf } from "@/lib/score/score-view";
import { suggestPart } from "@/lib/score/suggest-part";
import { NumberFields } from "../../../_components/number-fields";
import { scoreHref } from "../../../_components/selection";
import { confirmReading } from "../../../actions";
import { PartRow } from "./part-row";
import type { ReviewValues } from "./review-values";
import { WhatChanges } from "./what-changes";

function plansFor(review: ScoreReview, numberId: string): PartPlan[] {
  const number = review.numbers.find((each) => each.id === numberId) ?? null;
  return review.parts.map((part) => suggestPart(part, review.roles, number));
}

/** Where a reading is put in place: which number it is, what each part becomes, and what all of it changes. */
export function ReviewForm({
  productionId,
  review,
}: {
  productionId: string;
  review: ScoreReview;
}) {
  const router = useRouter();
  const numberId = review.numberId ?? "";
  const { proposed } = review;
  const state = useActionForm({
    schema: () => import("@/lib/schemas/score").then((m) => m.confirmReadingSchema),
    action: confirmReading,
    defaultValues: {
      productionId,
      scoreId: review.scoreId,
      numberId,
      version: review.numbers.find((number) => number.id === numberId)?.version ?? null,
      ...proposed,
      keyFifths: proposed.keyFifths === null ? "" : String(proposed.keyFifths),
      parts: plansFor(review, numberId),
    },
    onDone: (done) => {
      showToast({
        title: `Number ${done.label} is in, with ${String(done.lines)} ${done.lines === 1 ? "line" : "lines"}.`,
      });
      router.push(scoreHref(productionId, { number: done.numberId }));
    },
  });
  // The schema's input is wider than what these fields ever hold.
  const form = state.form as unknown as UseFormReturn<ReviewValues>;
  const scale = scaleOf(review.parts.flatMap((part) => (part.line ? [part.line] : [])));

  function chooseNumber(id: string) {
    const number = review.numbers.find((each) => each.id === id) ?? null;
    form.setValue("numberId", id);
    form.setValue("version", number?.version ?? null);
    form.setValue("label", number?.label ?? nextFree(review));
    form.setValue("title", number?.title ?? review.title);
    form.setValue("parts", plansFor(review, id));
    form.clearErrors();
  }

  return (
    <ActionForm
      state={state}
      submitLabel="Put it in"
      pendingLabel="Putting it in"
      className="max-w-none!"
      beside={
        <Button kind="quiet" asChild>
          <Link href={scoreHref(productionId, {})}>Leave it out</Link>
        </Button>
      }
    >
      <div className="grid grid-cols-1 gap-8 lg:grid-cols-[minmax(0,1fr)_20rem] xl:gap-10">
        <div className="flex min-w-0 flex-col gap-8">
          <section aria-labelledby="number-part" className="flex max-w-2xl flex-col gap-4">
            <SectionTitle id="number-part">The number</SectionTitle>
            {review.numbers.length > 0 && (
              <Field
                label="This file is"
                hint="A newer file of a number replaces the lines read before; roles and casting stay."
              >
                <Select
                  {...form.register("numberId", {
                    onChange: (event: { target: { value: string } }) => {
                      chooseNumber(event.target.value);
                    },
                  })}
                >
                  <option value="">a new number</option>
                  {review.numbers.map((number) => (
                    <option key={number.id} value={number.id}>
                      a newer file of {number.label}, {number.title}
                    </option>
                  ))}
                </Select>
              </Field>
            )}
            <NumberFields
              register={form.register}
              errors={form.formState.errors}
              {...(proposed.keyFifths !== null && {
                keyHint: `The score shows ${signatureInWords(proposed.keyFifths)}; small letters are minor`,
              })}
            />
          </section>
          <section aria-labelledby="parts-part">
            <SectionTitle id="parts-part" ruled>
              The parts
            </SectionTitle>
            <ol>
              {review.parts.map((part, index) => (
                <PartRow
                  key={part.scorePartId}
                  form={form}
                  index={index}
                  part={part}
                  roles={review.roles}
                  scale={scale}
                  fifths={proposed.keyFifths ?? 0}
                />
              ))}
            </ol>
          </section>
        </div>
        <aside aria-label="What changes" className="min-w-0 lg:sticky lg:top-4 lg:self-start">
          <WhatChanges control={form.control} review={review} />
        </aside>
      </div>
    </ActionForm>
  );
}

/** The proposed label, unless it belongs to the number the file seemed to be. */
function nextFree(review: ScoreReview): string {
  const used = review.numbers
    .map((number) => Number.parseInt(number.label, 10))
    .filter(Number.isFinite);
  return review.numberId === null ? review.proposed.label : String(Math.max(0, ...used) + 1);
}
