"use client";

import { useWatch } from "react-hook-form";
import type { Control } from "react-hook-form";
import { importChanges } from "@/lib/score/import-changes";
import type { ImportChange } from "@/lib/score/import-changes";
import type { ScoreReview } from "@/lib/score/review-types";
import type { ReviewValues } from "./review-values";

const SIGNS: Record<ImportChange["kind"], string> = {
  adds: "+",
  replaces: "↻",
  removes: "−",
  leaves: "·",
};

/** Everything that putting the reading in will change, as the form stands. */
export function WhatChanges({
  control,
  review,
}: {
  control: Control<ReviewValues>;
  review: ScoreReview;
}) {
  const [numberId, label, title, parts] = useWatch({
    control,
    name: ["numberId", "label", "title", "parts"],
  });
  const number = review.numbers.find((each) => each.id === numberId) ?? null;
  const changes = importChanges(
    { label, title, parts },
    { number, roles: review.roles, parts: review.parts },
  );
  return (
    <>
      <h2 className="mb-2 text-2xl">What this changes</h2>
      <ul aria-live="polite" className="border-t border-rule">
        {changes.map((change) => (
          <li
            key={change.text}
            className="flex gap-3 border-b border-rule py-2 text-sm wrap-anywhere"
          >
            <span aria-hidden="true" className="w-3 shrink-0 text-center font-bold">
              {SIGNS[change.kind]}
            </span>
            {change.text}
          </li>
        ))}
      </ul>
    </>
  );
}
