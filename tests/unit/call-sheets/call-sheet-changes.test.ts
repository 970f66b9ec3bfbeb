import { describe, expect, test } from "vitest";
import { callSheetChanges } from "@/lib/call-sheets/call-sheet-changes";
import type { CallSheet, CallSheetBlock } from "@/lib/call-sheets/types";
import { drawnCallSheet } from "../../fixtures/sheets/drawn-call-sheet";

const ness: CallSheetBlock = {
  id: "ness",
  from: "18:30",
  to: "19:15",
  kind: "music",
  numberLabel: "9",
  title: "The Ness Light",
  who: ["Wren Tallis", "Teodor Lindqvist-Amara"],
  where: "Room 2",
  pianist: "Osric Dlamini",
};
const reel: CallSheetBlock = {
  id: "reel",
  from: "20:20",
  to: "20:55",
  kind: "music",
  numberLabel: "12",
  title: "Harbour Reel",
  who: ["Ciarán Obuya"],
  where: "Room 2",
};
const sheet = (blocks: CallSheetBlock[], more: Partial<CallSheet> = {}): CallSheet => ({
  ...drawnCallSheet,
  released: [],
  blocks,
  ...more,
});
const changes = (before: CallSheetBlock[], after: CallSheetBlock[]) =>
  callSheetChanges(sheet(before), sheet(after));

test("the same sheet has no changes", () => {
  expect(callSheetChanges(drawnCallSheet, structuredClone(drawnCallSheet))).toEqual([]);
});

// Source: the product's own drawn call sheet.
test("a number moves, and somebody is called later within a block", () => {
  const after = [
    { ...reel, who: ["Teodor Lindqvist-Amara (from 20:30)", "Ciarán Obuya"] },
    { ...ness, from: "20:55", to: "21:40" },
  ];
  expect(
    changes([ness, { ...reel, who: ["Teodor Lindqvist-Amara", "Ciarán Obuya"] }], after),
  ).toEqual([
    "The Ness Light moves from 18:30 to 20:55",
    "Teodor Lindqvist-Amara is called at 20:30, not 18:30",
    "Wren Tallis is called at 20:55, not 18:30",
  ]);
});

describe("each kind of change", () => {
  test.each<[string, Partial<CallSheetBlock>, string[]]>([
    ["a longer block", { to: "19:30" }, ["The Ness Light ends at 19:30, not 19:15"]],
    ["a room", { where: "Hall" }, ["The Ness Light is in Hall, not Room 2"]],
    [
      "a pianist",
      { pianist: "Hanne Briscoe" },
      ["Hanne Briscoe plays The Ness Light, not Osric Dlamini"],
    ],
    ["bars", { bars: "20–40" }, ["The Ness Light is now bars 20–40"]],
    [
      "another title under the same id",
      { title: "Lamps Out" },
      ["Lamps Out replaces The Ness Light"],
    ],
    [
      "people",
      { who: ["Wren Tallis", "Junia Vale"] },
      [
        "Junia Vale is needed for The Ness Light",
        "Teodor Lindqvist-Amara is not needed for The Ness Light",
        "Junia Vale is called at 18:30",
        "Teodor Lindqvist-Amara is not called",
      ],
    ],
  ])("%s", (_what, change, expected) => {
    expect(changes([ness], [{ ...ness, ...change }])).toEqual(expected);
  });

  test("no pianist any more", () => {
    const { pianist: _gone, ...without } = ness;
    expect(changes([ness], [without])).toEqual(["The Ness Light has no pianist"]);
    expect(changes([without], [ness])).toEqual(["Osric Dlamini plays The Ness Light"]);
  });

  test("added and off", () => {
    expect(changes([ness], [reel])).toEqual([
      "Harbour Reel is added, 20:20–20:55",
      "The Ness Light at 18:30 is off",
      "Ciarán Obuya is called at 20:20",
      "Wren Tallis and Teodor Lindqvist-Amara are not called",
    ]);
  });

  test("a release", () => {
    const released = (at: string) => sheet([], { released: [{ who: "Sabela Roque", at }] });
    expect(callSheetChanges(released("20:20"), released("21:00"))).toEqual([
      "Sabela Roque is released at 21:00, not 20:20",
    ]);
  });
});

describe("blocks are matched", () => {
  const withoutId = ({ id: _id, ...block }: CallSheetBlock): CallSheetBlock => block;

  test("by title when there are no ids", () => {
    expect(changes([ness].map(withoutId), [{ ...ness, from: "18:45" }].map(withoutId))).toContain(
      "The Ness Light moves from 18:30 to 18:45",
    );
  });

  test("twice on one day: the one that stayed is not the one that moved", () => {
    const second = { ...ness, id: "ness 2", from: "21:00", to: "21:30" };
    const moved = { ...second, from: "21:10" };
    expect(changes([ness, second].map(withoutId), [ness, moved].map(withoutId))).toEqual([
      "The Ness Light moves from 21:00 to 21:10",
    ]);
    expect(changes([ness, second], [{ ...second, from: "18:30", to: "19:15" }])).toContain(
      "The Ness Light moves from 21:00 to 18:30",
    );
  });
});
