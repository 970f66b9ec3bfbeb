import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { planFill } from "@/lib/auditions/plan-fill";
import type { Asking, FreeSlot } from "@/lib/auditions/plan-fill";

const at = (minute: number) => new Date(Date.UTC(2027, 2, 20, 10, minute));
const slot = (index: number, room = 0): FreeSlot => ({
  slotId: `s${String(index)}-${String(room)}`,
  startsAt: at(index * 8),
  endsAt: at(index * 8 + 8),
  roomPlace: room,
});
const singer = (
  signUpId: string,
  place: number,
  notBefore: number | null = null,
  notAfter: number | null = null,
): Asking => ({
  signUpId,
  place,
  notBefore: notBefore === null ? null : at(notBefore),
  notAfter: notAfter === null ? null : at(notAfter),
});

describe("placing everyone", () => {
  test("goes by the order of sign-ups where nobody asked for a time", () => {
    const fill = planFill(
      [slot(1), slot(0)],
      [singer("second", 2), singer("first", 1), singer("third", 3)],
    );
    expect(fill.placements).toEqual([
      { signUpId: "first", slotId: "s0-0" },
      { signUpId: "second", slotId: "s1-0" },
    ]);
    expect(fill.unplaced).toEqual([{ signUpId: "third", reason: "taken" }]);
  });

  test("gives the early slot to the one who can come at no other time", () => {
    const fill = planFill([slot(0), slot(1)], [singer("any", 1), singer("early", 2, null, 8)]);
    expect(fill.placements).toEqual([
      { signUpId: "early", slotId: "s0-0" },
      { signUpId: "any", slotId: "s1-0" },
    ]);
  });

  test("a slot that runs past the latest time does not suit", () => {
    expect(planFill([slot(0)], [singer("a", 1, null, 7)]).unplaced).toEqual([
      { signUpId: "a", reason: "outside" },
    ]);
    expect(planFill([slot(0)], [singer("a", 1, 1)]).unplaced).toEqual([
      { signUpId: "a", reason: "outside" },
    ]);
    expect(planFill([slot(0)], [singer("a", 1, 0, 8)]).placements).toHaveLength(1);
  });

  // The check from outside: a search through every way of placing, which knows nothing of deadlines.
  function most(slots: readonly FreeSlot[], singers: readonly Asking[]): number {
    const [first, ...rest] = singers;
    if (!first) return 0;
    const without = most(slots, rest);
    const withFirst = slots
      .filter(
        (s) =>
          (first.notBefore === null || s.startsAt >= first.notBefore) &&
          (first.notAfter === null || s.endsAt <= first.notAfter),
      )
      .map(
        (s) =>
          1 +
          most(
            slots.filter((other) => other !== s),
            rest,
          ),
      );
    return Math.max(without, ...withFirst);
  }

  test("places as many as any plan can", () => {
    const minute = fc.option(fc.integer({ min: 0, max: 48 }), { nil: null });
    fc.assert(
      fc.property(
        fc.uniqueArray(fc.tuple(fc.integer({ min: 0, max: 5 }), fc.integer({ min: 0, max: 1 })), {
          maxLength: 6,
          selector: ([i, room]) => i * 2 + room,
        }),
        fc.array(fc.tuple(minute, minute), { maxLength: 6 }),
        (places, wishes) => {
          const slots = places.map(([index, room]) => slot(index, room));
          const singers = wishes.map(([from, to], index) => singer(String(index), index, from, to));
          const fill = planFill(slots, singers);
          expect(fill.placements.length).toBe(most(slots, singers));
          expect(fill.placements.length + fill.unplaced.length).toBe(singers.length);
          expect(new Set(fill.placements.map((p) => p.slotId)).size).toBe(fill.placements.length);
        },
      ),
      { numRuns: 300 },
    );
  });
});
