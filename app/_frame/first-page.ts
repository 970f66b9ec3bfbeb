import type { Actor, PositionKind } from "@/lib/permissions/types";

const WITH_PLANS = new Set<PositionKind>([
  "music_director",
  "assistant_md",
  "stage_manager",
  "director",
  "choreographer",
  "producer",
  "company_admin",
]);

/** Whether the person has the season's plans before them, or comes for what concerns themselves. */
export function seesPlans(actor: Actor): boolean {
  return actor.positions.some((position) => WITH_PLANS.has(position.kind));
}

/** Where someone starts who did not ask for a page: those who plan at the season, everyone else at their own page. */
export function firstPage(actor: Actor): "/season" | "/me" {
  return seesPlans(actor) ? "/season" : "/me";
}
