import type { CallSheet, CallSheetBlock } from "./types";

/**
 * What changed from one issue of a call sheet to the next, as sentences without a full stop: first what
 * moved, was added or is off, then rooms, pianists and people of each block, then who is called at
 * another time and released at another. Blocks are matched by id, else by number and title in order.
 * An empty list means that nobody has to do anything differently.
 */
export function callSheetChanges(previous: CallSheet, next: CallSheet): string[] {
  const { kept, added, removed } = match(previous.blocks, next.blocks);
  return [
    ...kept.flatMap(([before, after]) => timeChange(before, after)),
    ...added.map((block) => `${nameOf(block)} is added, ${block.from}–${block.to}`),
    ...removed.map((block) => `${nameOf(block)} at ${block.from} is off`),
    ...kept.flatMap(([before, after]) => blockChange(before, after)),
    ...firstCallChanges(previous.blocks, next.blocks),
    ...releaseChanges(previous, next),
  ];
}

type Pair = [before: CallSheetBlock, after: CallSheetBlock];

function match(before: CallSheetBlock[], after: CallSheetBlock[]) {
  const left = [...before];
  const kept: Pair[] = [];
  const take = (same: (block: CallSheetBlock) => boolean) => {
    const index = left.findIndex(same);
    return index === -1 ? undefined : left.splice(index, 1)[0];
  };
  // Ids first for all, so that a block without one cannot take the place of one that has it.
  const partners = new Map<CallSheetBlock, CallSheetBlock>();
  for (const block of after) {
    const found = block.id === undefined ? undefined : take(({ id }) => id === block.id);
    if (found) partners.set(block, found);
  }
  const added: CallSheetBlock[] = [];
  for (const block of after) {
    const found =
      partners.get(block) ??
      take((old) => alike(old, block) && old.from === block.from) ??
      take((old) => alike(old, block));
    if (found) kept.push([found, block]);
    else added.push(block);
  }
  return { kept, added, removed: left };
}

function alike(a: CallSheetBlock, b: CallSheetBlock): boolean {
  const sameIds = a.id === undefined || b.id === undefined;
  return sameIds && a.kind === b.kind && a.numberLabel === b.numberLabel && a.title === b.title;
}

function nameOf(block: CallSheetBlock): string {
  return block.title === "" ? block.kind : block.title;
}

function timeChange(before: CallSheetBlock, after: CallSheetBlock): string[] {
  if (before.from !== after.from)
    return [`${nameOf(after)} moves from ${before.from} to ${after.from}`];
  if (before.to !== after.to) return [`${nameOf(after)} ends at ${after.to}, not ${before.to}`];
  return [];
}

function blockChange(before: CallSheetBlock, after: CallSheetBlock): string[] {
  const name = nameOf(after);
  const changes: string[] = [];
  if (nameOf(before) !== name) changes.push(`${name} replaces ${nameOf(before)}`);
  if (before.where !== after.where && after.where !== "") {
    changes.push(
      before.where === ""
        ? `${name} is in ${after.where}`
        : `${name} is in ${after.where}, not ${before.where}`,
    );
  }
  if (before.bars !== after.bars || before.detail !== after.detail) {
    const what = [after.detail, after.bars === undefined ? undefined : `bars ${after.bars}`].filter(
      Boolean,
    );
    changes.push(
      what.length > 0 ? `${name} is now ${what.join(", ")}` : `${name} is now all of it`,
    );
  }
  if (before.pianist !== after.pianist)
    changes.push(pianistChange(name, before.pianist, after.pianist));
  const old = new Set(before.who.map(personOf));
  const now = new Set(after.who.map(personOf));
  const joining = [...now].filter((person) => !old.has(person));
  const leaving = [...old].filter((person) => !now.has(person));
  if (joining.length > 0) changes.push(`${list(joining)} ${are(joining)} needed for ${name}`);
  if (leaving.length > 0) changes.push(`${list(leaving)} ${are(leaving)} not needed for ${name}`);
  return changes;
}

function pianistChange(
  name: string,
  before: string | undefined,
  after: string | undefined,
): string {
  if (after === undefined) return `${name} has no pianist`;
  return before === undefined ? `${after} plays ${name}` : `${after} plays ${name}, not ${before}`;
}

function firstCallChanges(before: CallSheetBlock[], after: CallSheetBlock[]): string[] {
  const [old, now] = [firstCalls(before), firstCalls(after)];
  // People with the same change share a sentence: a moved chorus is one line, not forty.
  const groups = new Map<string, string[]>();
  const note = (change: string, person: string) => {
    groups.set(change, [...(groups.get(change) ?? []), person]);
  };
  for (const [person, time] of now) {
    const was = old.get(person);
    if (was === undefined) note(`called at ${time}`, person);
    else if (was !== time) note(`called at ${time}, not ${was}`, person);
  }
  for (const person of old.keys()) {
    if (!now.has(person)) note("not called", person);
  }
  return [...groups].map(([change, people]) => `${list(people)} ${are(people)} ${change}`);
}

/** Blocks stand in the order of the day, so the first that names a person is their first call. */
function firstCalls(blocks: CallSheetBlock[]): Map<string, string> {
  const calls = new Map<string, string>();
  for (const { from, who } of blocks) {
    for (const entry of who) {
      const later = /\(from (\d{2}:\d{2})\)/.exec(entry)?.[1];
      const person = personOf(entry);
      if (!calls.has(person)) calls.set(person, later ?? from);
    }
  }
  return calls;
}

function releaseChanges(previous: CallSheet, next: CallSheet): string[] {
  const old = new Map(previous.released.map(({ who, at }) => [who, at]));
  return next.released.flatMap(({ who, at }) => {
    const was = old.get(who);
    return was === undefined || was === at ? [] : [`${who} is released at ${at}, not ${was}`];
  });
}

function personOf(entry: string): string {
  return entry.replace(/\s*\(from \d{2}:\d{2}\)\s*$/, "");
}

function list(names: string[]): string {
  return names.length < 2
    ? names.join("")
    : `${names.slice(0, -1).join(", ")} and ${names.at(-1) ?? ""}`;
}

function are(names: string[]): string {
  return names.length === 1 ? "is" : "are";
}
