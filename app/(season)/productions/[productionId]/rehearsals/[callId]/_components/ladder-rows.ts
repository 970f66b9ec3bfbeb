import type { LadderRow } from "@/components/schedule/call-ladder";
import type { CallBlockRead } from "@/lib/data/calls/read";

/** Above so many people with the same roles and the same blocks, one row stands for all of them. */
const ROWS_EACH = 3;

/** A row of the ladder; one that stands for many people names them too. */
export type CrowdRow = LadderRow & { crowd?: string[] };

type Person = {
  personId: string;
  name: string;
  roles: string;
  blockIds: string[];
  /** What is said of somebody without a role: why they are called. */
  why: string;
};

/**
 * The rows of a call's ladder: a role and who sings it, in the order they come; a crowd that is needed in
 * the same blocks under the same role is one row with its number.
 */
export function ladderRows(blocks: readonly CallBlockRead[]): CrowdRow[] {
  const people = new Map<string, Person & { roleSet: Set<string> }>();
  for (const block of blocks) {
    for (const called of block.called) {
      if (called.excused) continue;
      const person = people.get(called.personId) ?? {
        personId: called.personId,
        name: called.name,
        roles: "",
        roleSet: new Set<string>(),
        blockIds: [],
        why: called.source === "hand" ? (called.reason ?? "called by hand") : "called",
      };
      for (const role of called.roles) person.roleSet.add(role);
      person.blockIds.push(block.key);
      people.set(called.personId, person);
    }
  }
  const groups = new Map<string, Person[]>();
  for (const { roleSet, ...person } of people.values()) {
    const roles = [...roleSet].join(", ");
    const name = `${roles} ${person.blockIds.join(" ")}`;
    groups.set(name, [...(groups.get(name) ?? []), { ...person, roles }]);
  }
  return [...groups.values()].flatMap((group): CrowdRow[] => {
    const [first] = group;
    if (!first) return [];
    if (group.length > ROWS_EACH && first.roles !== "") {
      return [
        {
          id: first.personId,
          name: first.roles,
          sub: `${String(group.length)} singers`,
          blockIds: first.blockIds,
          crowd: group.map((person) => person.name),
        },
      ];
    }
    return group.map((person) => ({
      id: person.personId,
      name: person.roles === "" ? person.name : person.roles,
      sub: person.roles === "" ? person.why : person.name,
      blockIds: person.blockIds,
    }));
  });
}
