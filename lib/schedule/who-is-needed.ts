import type { BlockNeeds, NeededPerson } from "./types";

interface WhoIsNeededInput {
  blocks: readonly { id: string; numberId: string | null }[];
  /** A vocal line: a role sings in a number. */
  lines: readonly { roleId: string; numberId: string }[];
  cast: readonly { roleId: string; personId: string }[];
}

/**
 * Who each block of a call needs, as the score says: everyone cast in a role that sings in the block's
 * number. A person is named once, with every role that makes them needed; a role that sings and has
 * nobody yet is in `uncastRoleIds`. A block without a number (a break, a scene) needs nobody by score.
 * People come in the order of `cast`, roles in the order of `lines`; blocks in the order given.
 */
export function whoIsNeeded({ blocks, lines, cast }: WhoIsNeededInput): BlockNeeds[] {
  const rolesOfNumber = groupBy(lines, (line) => line.numberId);
  const castOfRole = groupBy(cast, (choice) => choice.roleId);
  const castOrder = new Map<string, number>();
  for (const { personId } of cast) {
    if (!castOrder.has(personId)) castOrder.set(personId, castOrder.size);
  }
  const place = (person: NeededPerson) => castOrder.get(person.personId) ?? 0;

  return blocks.map(({ id, numberId }) => {
    const sung = numberId === null ? [] : (rolesOfNumber.get(numberId) ?? []);
    const people = new Map<string, NeededPerson>();
    const uncastRoleIds: string[] = [];
    for (const roleId of new Set(sung.map((line) => line.roleId))) {
      const holders = castOfRole.get(roleId) ?? [];
      if (holders.length === 0) uncastRoleIds.push(roleId);
      for (const { personId } of holders) {
        const needed = people.get(personId) ?? { personId, roleIds: [] };
        if (!needed.roleIds.includes(roleId)) needed.roleIds.push(roleId);
        people.set(personId, needed);
      }
    }
    const inCastOrder = [...people.values()].sort((a, b) => place(a) - place(b));
    return { blockId: id, people: inCastOrder, uncastRoleIds };
  });
}

function groupBy<Item>(items: readonly Item[], key: (item: Item) => string): Map<string, Item[]> {
  const groups = new Map<string, Item[]>();
  for (const item of items) {
    const group = groups.get(key(item));
    if (group) group.push(item);
    else groups.set(key(item), [item]);
  }
  return groups;
}
