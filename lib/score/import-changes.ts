import type { PartPlan, ReviewNumber, ReviewPart, ReviewRole } from "./review-types";

export type ImportChange = { kind: "adds" | "replaces" | "removes" | "leaves"; text: string };

const count = (n: number, word: string): string => `${String(n)} ${word}${n === 1 ? "" : "s"}`;
const list = (names: readonly string[]): string => names.join(", ");

/**
 * In words, everything that confirming an import will change, before it does. In: what each part is to become, and the
 * number (null for a new one) and roles as they stand. Out: one sentence per change, in the order of weight.
 */
export function importChanges(
  plan: { label: string; title: string; parts: readonly PartPlan[] },
  standing: {
    number: ReviewNumber | null;
    roles: readonly ReviewRole[];
    parts: readonly ReviewPart[];
  },
): ImportChange[] {
  const { number, roles } = standing;
  const changes: ImportChange[] = [];
  const name = [plan.label.trim(), plan.title.trim()].filter(Boolean).join(", ");
  changes.push(
    number
      ? {
          kind: "replaces",
          text: `Number ${number.label}, ${number.title}, takes the details above.`,
        }
      : { kind: "adds", text: `Adds number ${name || "without a name yet"}.` },
  );
  const used = plan.parts.filter((part) => part.to !== "leave");
  const newRoles = [
    ...new Set(used.filter((part) => part.to === "new").map((part) => part.name.trim())),
  ].filter(Boolean);
  if (newRoles.length > 0)
    changes.push({
      kind: "adds",
      text: `Adds ${count(newRoles.length, "role")}: ${list(newRoles)}.`,
    });
  changes.push({
    kind: "adds",
    text:
      used.length === 0
        ? "Adds no line: every part is left out."
        : `Adds ${count(used.length, "line")} read from the score.`,
  });

  const read = number?.lines.filter((line) => line.source === "read") ?? [];
  if (read.length > 0)
    changes.push({
      kind: "replaces",
      text: `Replaces ${count(read.length, "line")} read before in this number. Roles and casting stay.`,
    });
  const roleName = (id: string): string =>
    roles.find((role) => role.id === id)?.name ?? "a removed role";
  const taken = new Set(used.map((part) => part.to));
  const silent = [...new Set(read.map((line) => line.roleId))].filter((id) => !taken.has(id));
  if (silent.length > 0)
    changes.push({
      kind: "removes",
      text: `${list(silent.map(roleName))}: no line in this number any more.`,
    });
  const typed = (number?.lines ?? []).filter(
    (line) => line.source === "typed" && taken.has(line.roleId),
  );
  if (typed.length > 0)
    changes.push({
      kind: "removes",
      text: `The line typed in for ${list(typed.map((line) => roleName(line.roleId)))} gives way to the one read.`,
    });
  const left = plan.parts
    .filter((part) => part.to === "leave")
    .map((part) => standing.parts.find((p) => p.scorePartId === part.scorePartId)?.name ?? "");
  if (left.length > 0)
    changes.push({ kind: "leaves", text: `Leaves out ${list(left.filter(Boolean))}.` });
  return changes;
}
