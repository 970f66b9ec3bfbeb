import type { PartPlan, ReviewNumber, ReviewPart, ReviewRole } from "./review-types";

const MAX_NAME = 120;
const fold = (name: string): string => name.trim().replace(/\s+/g, " ").toLocaleLowerCase("en");

/** Names that speak of many voices rather than of a part in the show. */
const MANY =
  /\b(ensemble|chorus|choir|chor|choeur|chœur|coro|men|women|boys|girls|children|sopranos|altos|tenors|basses)\b/iu;

/**
 * What a part will most likely become. In: the part, the production's roles and, where the file is a newer one of a number
 * that stands already, that number. A part read before goes to the role it went to, with the octave it had; else to the
 * role of its own name; else a sung part makes a new role; what is not sung is left out.
 */
export function suggestPart(
  part: ReviewPart,
  roles: readonly ReviewRole[],
  number: ReviewNumber | null,
): PartPlan {
  const name = part.name.trim().replace(/\s+/g, " ").slice(0, MAX_NAME);
  const plan: PartPlan = {
    scorePartId: part.scorePartId,
    to: "leave",
    name,
    kind: MANY.test(name) ? "ensemble" : "principal",
    octaveShift: 0,
  };
  if (!part.line) return plan;
  const before = number?.lines.find(
    (line) => line.source === "read" && line.partKey === part.partKey,
  );
  if (before && roles.some((role) => role.id === before.roleId))
    return { ...plan, to: before.roleId, octaveShift: before.octaveShift };
  const namesake = roles.find((role) => fold(role.name) === fold(name));
  if (namesake) return { ...plan, to: namesake.id };
  return part.vocal ? { ...plan, to: "new" } : plan;
}
