import type { Route } from "next";
import type { ScoreNumber, ScoreRole, ScoreView } from "@/lib/score/score-view";

type Asked = Record<string, string | string[] | undefined>;

/**
 * What the address selects: a role, a number, or a role in a number. Without either (or where it is gone) the first role
 * that sings, so that the side of the page is never empty.
 */
export function selectionOf(
  view: ScoreView,
  asked: Asked,
): { role: ScoreRole | null; number: ScoreNumber | null } {
  const role = view.roles.find((each) => each.id === asked["role"]) ?? null;
  const number = view.numbers.find((each) => each.id === asked["number"]) ?? null;
  if (role || number) return { role, number };
  const singing = new Set(view.lines.map((line) => line.roleId));
  return {
    role: view.roles.find((each) => singing.has(each.id)) ?? view.roles[0] ?? null,
    number: null,
  };
}

/** The page with a role, a number or a role in a number selected. */
export function scoreHref(
  productionId: string,
  select: { role?: string; number?: string },
  anchor = "",
): Route {
  const query = new URLSearchParams(select).toString();
  return `/productions/${productionId}/score${query ? `?${query}` : ""}${anchor}` as Route;
}
