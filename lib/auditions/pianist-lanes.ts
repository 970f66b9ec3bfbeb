import type { RoomOnDay } from "./day-view";

export type LanePiece = { id: string; name: string | null; startsAt: string; endsAt: string };

/**
 * The lane beside a room: who plays when, and (name null) every stretch in which singers are to be heard and nobody
 * plays. Rests and lunch need no pianist; a stretch goes on over a rest, and ends at lunch. In order of time.
 */
export function pianistLanes(room: RoomOnDay): LanePiece[] {
  const lane: LanePiece[] = room.pianists.map(({ id, name, startsAt, endsAt }) => ({
    id,
    name,
    startsAt,
    endsAt,
  }));
  let open: LanePiece | null = null;
  for (const item of room.items) {
    if (item.kind === "rest") continue;
    const played = room.pianists.some(
      (p) => p.startsAt <= item.startsAt && p.endsAt >= item.endsAt,
    );
    if (item.kind === "lunch" || played) {
      open = null;
    } else if (open === null) {
      open = { id: `none-${item.id}`, name: null, startsAt: item.startsAt, endsAt: item.endsAt };
      lane.push(open);
    } else {
      open.endsAt = item.endsAt;
    }
  }
  return lane.sort((a, b) => (a.startsAt < b.startsAt ? -1 : 1));
}
