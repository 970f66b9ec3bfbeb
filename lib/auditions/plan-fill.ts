export type FreeSlot = { slotId: string; startsAt: Date; endsAt: Date; roomPlace: number };

export type Asking = {
  signUpId: string;
  /** In the order the sign-ups were taken. */
  place: number;
  /** The earliest start and the latest end asked for. */
  notBefore: Date | null;
  notAfter: Date | null;
};

export type Fill = {
  placements: { signUpId: string; slotId: string }[];
  /** `outside`: no slot of the day lies in the time asked for. `taken`: those that do are gone. */
  unplaced: { signUpId: string; reason: "outside" | "taken" }[];
};

/**
 * Puts singers into the free slots of a day, as many as can be: slots in order of time, each to the
 * singer among those it suits whose latest time comes first, and of equals to the earlier sign-up.
 *
 * All slots of a day are equally long, so each singer suits an unbroken run of slots in order of time,
 * and for such graphs this rule finds a largest matching (Glover 1967, "Maximum matching in a convex
 * bipartite graph", Naval Research Logistics Quarterly 14; cited from memory). No plan places more.
 */
export function planFill(slots: readonly FreeSlot[], singers: readonly Asking[]): Fill {
  const inOrder = [...slots].sort(
    (a, b) => a.startsAt.getTime() - b.startsAt.getTime() || a.roomPlace - b.roomPlace,
  );
  const suits = (slot: FreeSlot, singer: Asking): boolean =>
    (singer.notBefore === null || slot.startsAt >= singer.notBefore) &&
    (singer.notAfter === null || slot.endsAt <= singer.notAfter);
  const deadline = (singer: Asking): number =>
    singer.notAfter?.getTime() ?? Number.POSITIVE_INFINITY;

  const left = new Set(
    [...singers].sort((a, b) =>
      deadline(a) === deadline(b) ? a.place - b.place : deadline(a) - deadline(b),
    ),
  );
  const placements: Fill["placements"] = [];
  for (const slot of inOrder) {
    for (const singer of left) {
      if (!suits(slot, singer)) continue;
      placements.push({ signUpId: singer.signUpId, slotId: slot.slotId });
      left.delete(singer);
      break;
    }
  }
  const unplaced = [...left]
    .sort((a, b) => a.place - b.place)
    .map((singer) => ({
      signUpId: singer.signUpId,
      reason: inOrder.some((slot) => suits(slot, singer))
        ? ("taken" as const)
        : ("outside" as const),
    }));
  return { placements, unplaced };
}
