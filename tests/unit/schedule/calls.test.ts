import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { blockTimes } from "@/lib/schedule/block-times";
import { nextFree } from "@/lib/schedule/next-free";
import { overlaps } from "@/lib/schedule/overlaps";
import { releaseTimes } from "@/lib/schedule/release-times";
import { whoIsNeeded } from "@/lib/schedule/who-is-needed";

const at = (time: string) => new Date(`2027-04-06T${time}:00Z`);
const span = (from: string, to: string) => ({ from: at(from), to: at(to) });

test.each([
  [span("10:00", "11:00"), span("10:30", "10:45"), true],
  [span("10:00", "11:00"), span("09:00", "10:01"), true],
  [span("10:00", "11:00"), span("11:00", "12:00"), false],
  [span("10:00", "11:00"), span("10:30", "10:30"), false],
  [span("10:00", "11:00"), span("10:45", "10:15"), false],
])("overlap is half-open and the same both ways (case %#)", (a, b, expected) => {
  expect([overlaps(a, b), overlaps(b, a)]).toEqual([expected, expected]);
});

// Source: the product's own drawn call sheet for 6 April.
describe("the drawn call sheet", () => {
  const blocks = [
    { id: "ledger", minutes: 25, people: ["sabela", "ciaran"] },
    { id: "gulls", minutes: 20, people: ["wren", "sabela"] },
    { id: "tide", minutes: 30, people: ["wren", "ciaran"] },
    { id: "break", minutes: 15, people: [] },
    { id: "lamps", minutes: 20, people: ["wren", "sabela", "lior"] },
    { id: "reel", minutes: 35, people: ["teodor", "ciaran", "lior"] },
    { id: "ness", minutes: 45, people: ["wren", "teodor"] },
  ];

  test("blocks follow one another from the start", () => {
    const times = blockTimes(at("18:30"), blocks).map((block) =>
      block.to.toISOString().slice(11, 16),
    );
    expect(times).toEqual(["18:55", "19:15", "19:45", "20:00", "20:20", "20:55", "21:40"]);
  });

  test("everyone has a first call and a release", () => {
    const released = releaseTimes(blockTimes(at("18:30"), blocks));
    expect(released).toEqual([
      { personId: "sabela", firstCall: at("18:30"), release: at("20:20") },
      { personId: "ciaran", firstCall: at("18:30"), release: at("20:55") },
      { personId: "lior", firstCall: at("20:00"), release: at("20:55") },
      { personId: "wren", firstCall: at("18:55"), release: at("21:40") },
      { personId: "teodor", firstCall: at("20:20"), release: at("21:40") },
    ]);
  });

  test("a block without time is refused", () => {
    expect(() => blockTimes(at("18:30"), [{ minutes: 0 }])).toThrow(RangeError);
    expect(() => blockTimes(at("18:30"), [{ minutes: Number.NaN }])).toThrow(RangeError);
  });
});

describe("who is needed", () => {
  const lines = [
    { roleId: "Bet", numberId: "13" },
    { roleId: "Bet", numberId: "13" },
    { roleId: "Harbour master", numberId: "13" },
    { roleId: "Gull", numberId: "7" },
  ];
  const cast = [
    { roleId: "Bet", personId: "sabela" },
    { roleId: "Gull", personId: "wren" },
    { roleId: "Bet", personId: "wren" },
  ];

  test("everyone cast in a role that sings in the number, once, with their roles", () => {
    expect(whoIsNeeded({ blocks: [{ id: "b1", numberId: "13" }], lines, cast })).toEqual([
      {
        blockId: "b1",
        people: [
          { personId: "sabela", roleIds: ["Bet"] },
          { personId: "wren", roleIds: ["Bet"] },
        ],
        uncastRoleIds: ["Harbour master"],
      },
    ]);
  });

  test("somebody in two roles of one number has both", () => {
    const both = whoIsNeeded({
      blocks: [{ id: "b1", numberId: "7" }],
      lines: [...lines, { roleId: "Bet", numberId: "7" }],
      cast,
    });
    expect(both[0]?.people).toContainEqual({ personId: "wren", roleIds: ["Gull", "Bet"] });
  });

  test("a break and an unknown number need nobody", () => {
    const needs = whoIsNeeded({
      blocks: [
        { id: "break", numberId: null },
        { id: "new", numberId: "99" },
      ],
      lines,
      cast,
    });
    expect(needs).toEqual([
      { blockId: "break", people: [], uncastRoleIds: [] },
      { blockId: "new", people: [], uncastRoleIds: [] },
    ]);
  });
});

describe("the next free time", () => {
  const within = span("10:00", "22:00");

  test("the wanted time when it is free, else the nearest, later before earlier", () => {
    const wanted = span("19:00", "20:00");
    const next = (busy: { from: Date; to: Date }[]) =>
      nextFree({ wanted, busy, within, stepMinutes: 15 });
    expect(next([])).toEqual(wanted);
    expect(next([span("19:00", "19:15")])).toEqual(span("19:15", "20:15"));
    expect(next([span("19:45", "21:30")])).toEqual(span("18:45", "19:45"));
    expect(next([span("19:00", "20:00")])).toEqual(span("20:00", "21:00"));
    expect(next([span("10:30", "21:30")])).toBeNull();
  });

  test("agrees with trying every start", () => {
    const minute = (value: number) => new Date(at("10:00").getTime() + value * 60_000);
    const stretch = fc
      .tuple(fc.integer({ min: -20, max: 80 }), fc.integer({ min: 1, max: 20 }))
      .map(([start, length]) => ({ from: minute(start), to: minute(start + length) }));
    fc.assert(
      fc.property(
        stretch,
        fc.array(stretch, { maxLength: 6 }),
        fc.integer({ min: 1, max: 7 }),
        (wanted, busy, step) => {
          const room = { from: minute(0), to: minute(60) };
          const length = wanted.to.getTime() - wanted.from.getTime();
          const starts = Array.from(
            { length: 401 },
            (_, index) => wanted.from.getTime() + (index - 200) * step * 60_000,
          )
            .filter((from) => from >= +room.from && from + length <= +room.to)
            .filter((from) =>
              busy.every((taken) => +taken.to <= from || +taken.from >= from + length),
            )
            .sort((a, b) => Math.abs(a - +wanted.from) - Math.abs(b - +wanted.from) || b - a);
          const found = nextFree({ wanted, busy, within: room, stepMinutes: step });
          expect(found?.from.getTime()).toBe(starts[0]);
          if (found) expect(found.to.getTime() - found.from.getTime()).toBe(length);
        },
      ),
      { numRuns: 500, seed: 7 },
    );
  });

  test("steps without length are refused", () => {
    expect(() => nextFree({ wanted: within, busy: [], within, stepMinutes: 0 })).toThrow(
      RangeError,
    );
  });
});
