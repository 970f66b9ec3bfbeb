import type { PartPlan } from "@/lib/score/review-types";
import type { NumberFieldValues } from "../../../_components/number-fields";

/** What the form holds: text as typed, and a plan for each part. */
export type ReviewValues = NumberFieldValues & {
  productionId: string;
  scoreId: string;
  numberId: string;
  version: number | null;
  parts: PartPlan[];
};
