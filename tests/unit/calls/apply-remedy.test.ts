import { expect, test } from "vitest";
import { applyRemedy } from "@/lib/calls/apply-remedy";
import type { ChangeableCall } from "@/lib/calls/apply-remedy";

type Block = { key: string; minutes: string };
const call: ChangeableCall<Block> = {
  localDate: "2027-04-06",
  localTime: "18:30",
  roomId: "one",
  pianistId: "hanne",
  blocks: [
    { key: "a", minutes: "30" },
    { key: "b", minutes: "20" },
  ],
  hand: [{ personId: "imke", act: "call", reason: "Cover", keys: [] }],
};
const apply = (remedy: Parameters<typeof applyRemedy<Block, typeof call>>[1]) =>
  applyRemedy<Block, typeof call>(call, remedy);

test("each remedy changes only what it says", () => {
  expect(apply({ kind: "room", label: "", roomId: "two" })).toEqual({ ...call, roomId: "two" });
  expect(apply({ kind: "pianist", label: "", personId: "osric" })).toEqual({
    ...call,
    pianistId: "osric",
  });
  expect(apply({ kind: "start", label: "", localDate: "2027-04-07", localTime: "10:00" })).toEqual({
    ...call,
    localDate: "2027-04-07",
    localTime: "10:00",
  });
  expect(apply({ kind: "order", label: "", keys: ["b", "a"] }).blocks).toEqual([
    call.blocks[1],
    call.blocks[0],
  ]);
});

test("leaving out somebody who was called by hand shortens that change", () => {
  const { hand } = apply({
    kind: "excuse",
    label: "",
    personId: "imke",
    reason: "Has a conflict",
    keys: ["a"],
  });
  expect(hand).toEqual([
    { personId: "imke", act: "call", reason: "Cover", keys: ["b"] },
    { personId: "imke", act: "excuse", reason: "Has a conflict", keys: ["a"] },
  ]);
});
