import type { Interval, ReleaseTime } from "./types";

/**
 * When each person is first called and when they may go, from the blocks that need them. Waiting in
 * between is not a release. Sorted by release, then first call, then id. Blocks may come in any order.
 */
export function releaseTimes(
  blocks: readonly (Interval & { people: readonly string[] })[],
): ReleaseTime[] {
  const byPerson = new Map<string, ReleaseTime>();
  for (const { from, to, people } of blocks) {
    for (const personId of people) {
      const seen = byPerson.get(personId);
      byPerson.set(personId, {
        personId,
        firstCall: seen && seen.firstCall < from ? seen.firstCall : from,
        release: seen && seen.release > to ? seen.release : to,
      });
    }
  }
  return [...byPerson.values()].sort(
    (a, b) =>
      a.release.getTime() - b.release.getTime() ||
      a.firstCall.getTime() - b.firstCall.getTime() ||
      (a.personId < b.personId ? -1 : 1),
  );
}
