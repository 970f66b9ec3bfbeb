import type { ProductionListed } from "@/lib/data/productions";

export const STAGES = {
  planning: "Planning",
  auditions: "Auditions",
  casting: "Casting",
  rehearsals: "Rehearsals",
  running: "Running",
  closed: "Closed",
} as const satisfies Record<ProductionListed["stage"], string>;

/** The stage of a production in a word. */
export function stageName(stage: ProductionListed["stage"]): string {
  return STAGES[stage];
}
