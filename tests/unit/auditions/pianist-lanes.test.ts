import { describe, expect, test } from "vitest";
import type { ItemOnDay, RoomOnDay } from "@/lib/auditions/day-view";
import { pianistLanes } from "@/lib/auditions/pianist-lanes";

const at = (time: string): string => `2027-03-20T${time}:00.000Z`;
const item = (kind: ItemOnDay["kind"], from: string, to: string): ItemOnDay => ({
  id: from,
  kind,
  startsAt: at(from),
  endsAt: at(to),
  singer: null,
});
const room = (pianists: [string, string, string][]): RoomOnDay => ({
  id: "room",
  roomId: "room",
  name: "Room 1",
  venue: "Lantern Street",
  opensAt: at("10:00"),
  closesAt: at("14:00"),
  items: [
    item("slot", "10:00", "10:30"),
    item("slot", "10:30", "11:00"),
    item("rest", "11:00", "11:10"),
    item("slot", "11:10", "11:40"),
    item("lunch", "11:40", "12:40"),
    item("slot", "12:40", "13:10"),
    item("hold", "13:10", "13:40"),
  ],
  pianists: pianists.map(([name, from, to]) => ({
    id: name,
    personId: name,
    name,
    startsAt: at(from),
    endsAt: at(to),
  })),
});
const lane = (pianists: [string, string, string][]) =>
  pianistLanes(room(pianists)).map((piece) => [
    piece.name,
    piece.startsAt.slice(11, 16),
    piece.endsAt.slice(11, 16),
  ]);

describe("the pianists' lane", () => {
  test("with nobody at all goes on over a rest and ends at lunch", () => {
    expect(lane([])).toEqual([
      [null, "10:00", "11:40"],
      [null, "12:40", "13:40"],
    ]);
  });

  test("with everybody there has no gap: rests and lunch need no pianist", () => {
    expect(
      lane([
        ["Hanne", "10:00", "11:40"],
        ["Osric", "12:40", "13:40"],
      ]),
    ).toEqual([
      ["Hanne", "10:00", "11:40"],
      ["Osric", "12:40", "13:40"],
    ]);
  });

  test("shows a slot as without a pianist when one plays for only part of it", () => {
    expect(
      lane([
        ["Hanne", "10:00", "10:45"],
        ["Osric", "12:40", "14:00"],
      ]),
    ).toEqual([
      ["Hanne", "10:00", "10:45"],
      [null, "10:30", "11:40"],
      ["Osric", "12:40", "14:00"],
    ]);
  });
});
