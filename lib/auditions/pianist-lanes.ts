import type { RoomOnDay } from "./day-view";

export type LanePiece = { id: string; name: string | null; startsAt: string; endsAt: string };

/**
 * The lane beside a room: who plays when, and (name null) every stretch in which singers are to be heard and nobody
 * plays. Rests and lunch need no pianist. In order of time.
 */
export function pianistLanes(room: RoomOnDay): LanePiece[] {
  const lane: LanePiece[] = room.pianists.map(({ id, name, startsAt, endsAt }) => ({ id, name, startsAt, endsAt }));
  for (const item of room.items) {
    if (item.kind === "rest" || item.kind === "lunch") continue;
    if (room.pianists.some((p) => p.startsAt <= item.startsAt && p.endsAt >= item.endsAt)) continue;
    const last = lane.at(-1);
    if (last?.name === null && last.endsAt === item.startsAt) last.endsAt = item.endsAt;
    else lane.push({ id: `none-${item.id}`, name: null, startsAt: item.startsAt, endsAt: item.endsAt });
  }
  return lane.sort((a, b) => (a.startsAt < b.startsAt ? -1 : 1));
}
