import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { buildSlots } from "@/lib/schedule/build-slots";
import type { DayItem, SlotPlan } from "@/lib/schedule/types";

const at = (time: string) => new Date(`2027-03-20T${time}:00Z`);
const clock = (instant: Date) => instant.toISOString().slice(11, 16);

function itemsOf(plan: SlotPlan): DayItem[] {
  const result = buildSlots(plan);
  if (!result.ok) throw new Error(result.message);
  return result.items;
}

const pauses = (items: DayItem[]) =>
  items
    .filter((item) => item.kind === "rest" || item.kind === "lunch")
    .map((item) => `${item.kind} ${clock(item.from)}–${clock(item.to)}`);

describe("an audition day of 8-minute slots, 10 minutes' rest after 80, lunch of 60", () => {
  const day: SlotPlan = {
    opens: at("10:00"),
    closes: at("16:00"),
    slotMinutes: 8,
    rest: { afterMinutes: 80, restMinutes: 10 },
    lunch: { minutes: 60, windowFrom: at("12:30"), windowTo: at("14:00") },
  };

  // Source: the product's own drawing of an audition day; each time counted by hand.
  test("rests and lunch stand where the drawn day has them", () => {
    const items = itemsOf(day);
    expect(pauses(items)).toEqual(["rest 11:20–11:30", "lunch 12:50–13:50", "rest 15:10–15:20"]);
    expect(items.filter((item) => item.kind === "slot")).toHaveLength(10 + 10 + 10 + 5);
    expect(clock(items.at(-1)?.to ?? day.opens)).toBe("16:00");
  });

  test("one slot an hour of hearing is held for late-comers", () => {
    const held = itemsOf({ ...day, holdEveryMinutes: 60 })
      .filter((item) => item.kind === "hold")
      .map((item) => clock(item.from));
    // 35 slots of 8 minutes are 280 minutes: four full hours. By hand: slots 8, 15, 23 and 30.
    expect(held).toEqual(["10:56", "12:02", "14:06", "15:02"]);
  });

  test("lunch waits for its window when no slot would leave room for it", () => {
    const items = itemsOf({
      opens: at("10:00"),
      closes: at("16:00"),
      slotMinutes: 60,
      lunch: { minutes: 60, windowFrom: at("12:30"), windowTo: at("13:30") },
    });
    expect(items.map((item) => `${item.kind} ${clock(item.from)}`)).toEqual([
      "slot 10:00",
      "slot 11:00",
      "lunch 12:30",
      "slot 13:30",
      "slot 14:30",
    ]);
  });

  test("lunch takes the place of the first rest that falls due in its window", () => {
    const lunch = { minutes: 60, windowFrom: at("12:30"), windowTo: at("15:00") };
    expect(pauses(itemsOf({ ...day, lunch }))).toEqual([
      "rest 11:20–11:30",
      "lunch 12:50–13:50",
      "rest 15:10–15:20",
    ]);
  });

  test("a rest that would push lunch out of its window gives way to it", () => {
    const lunch = { minutes: 60, windowFrom: at("12:55"), windowTo: at("14:00") };
    expect(pauses(itemsOf({ ...day, lunch }))).toEqual([
      "rest 11:20–11:30",
      "lunch 12:55–13:55",
      "rest 15:15–15:25",
    ]);
  });

  test("a room open for only part of the window has no lunch of its own", () => {
    expect(pauses(itemsOf({ ...day, opens: at("13:00") }))).toEqual(["rest 14:20–14:30"]);
    expect(pauses(itemsOf({ ...day, closes: at("13:30") }))).toEqual([
      "rest 11:20–11:30",
      "rest 12:50–13:00",
    ]);
  });
});

// Source: an acting magazine's worked example of breaks, April 2025 (seen, secondary): 10:00 start,
// break at 10:55, resume 11:00, break at 11:55, resume 12:00; "5 minutes after no more than 55".
test("five minutes after fifty-five", () => {
  const items = itemsOf({
    opens: at("10:00"),
    closes: at("12:30"),
    slotMinutes: 5,
    rest: { afterMinutes: 55, restMinutes: 5 },
  });
  expect(pauses(items)).toEqual(["rest 10:55–11:00", "rest 11:55–12:00"]);
});

// Source: opera orchestra clause on rests during a played call (verified there, applied to audition
// pianists by analogy): 15 minutes' rest, 90 minutes best, 105 never passed.
test.each([
  { afterMinutes: 90, slotMinutes: 8, longest: 88 },
  { afterMinutes: 105, slotMinutes: 8, longest: 104 },
  { afterMinutes: 105, slotMinutes: 5, longest: 105 },
])(
  "at most $afterMinutes minutes at the piano: $longest",
  ({ afterMinutes, slotMinutes, longest }) => {
    const items = itemsOf({
      opens: at("10:00"),
      closes: at("18:00"),
      slotMinutes,
      rest: { afterMinutes, restMinutes: 15 },
    });
    expect(longestPlaying(items)).toBe(longest);
  },
);

// Derived in the trade notes from published lengths: 16 bars 20–30 an hour, one song 12–15, song with
// sides and range check 6–7.
test.each([
  [2, 30],
  [3, 20],
  [4, 15],
  [5, 12],
  [8, 7],
  [10, 6],
])("slots of %i minutes: %i an hour", (slotMinutes, count) => {
  expect(itemsOf({ opens: at("10:00"), closes: at("11:00"), slotMinutes })).toHaveLength(count);
});

describe("what cannot be laid out says why", () => {
  const day: SlotPlan = { opens: at("10:00"), closes: at("12:00"), slotMinutes: 8 };
  test.each<[string, Partial<SlotPlan>]>([
    ["closes-before-it-opens", { closes: at("10:00") }],
    ["closes-before-it-opens", { closes: new Date(Number.NaN) }],
    ["minutes-not-whole", { slotMinutes: 7.5 }],
    ["minutes-not-whole", { slotMinutes: 0 }],
    ["minutes-not-whole", { rest: { afterMinutes: 80, restMinutes: -5 } }],
    ["no-slot-fits", { slotMinutes: 121 }],
    ["no-slot-fits", { holdEveryMinutes: 5 }],
    ["slot-longer-than-playing-time", { rest: { afterMinutes: 7, restMinutes: 5 } }],
    [
      "lunch-longer-than-its-window",
      { lunch: { minutes: 60, windowFrom: at("12:30"), windowTo: at("13:00") } },
    ],
  ])("%s", (reason, change) => {
    const result = buildSlots({ ...day, ...change });
    expect(result).toMatchObject({ ok: false, reason });
    expect(result).toHaveProperty("message", expect.stringMatching(/\.$/));
  });
});

function longestPlaying(items: DayItem[]): number {
  let longest = 0;
  let run = 0;
  for (const item of items) {
    const playing = item.kind === "slot" || item.kind === "hold";
    run = playing ? run + (item.to.getTime() - item.from.getTime()) / 60_000 : 0;
    longest = Math.max(longest, run);
  }
  return longest;
}

const plans = fc.record({
  openMinute: fc.integer({ min: 0, max: 600 }),
  length: fc.integer({ min: 30, max: 700 }),
  slotMinutes: fc.integer({ min: 1, max: 20 }),
  afterMinutes: fc.integer({ min: 20, max: 120 }),
  restMinutes: fc.integer({ min: 1, max: 30 }),
  lunchMinutes: fc.integer({ min: 10, max: 90 }),
  windowStart: fc.integer({ min: 0, max: 700 }),
  windowSlack: fc.integer({ min: 0, max: 120 }),
  withRest: fc.boolean(),
  withLunch: fc.boolean(),
});

test("any day keeps its promises", () => {
  const midnight = at("00:00").getTime();
  const minute = (value: number) => new Date(midnight + value * 60_000);
  let lunches = 0;
  fc.assert(
    fc.property(plans, (given) => {
      const windowTo = given.windowStart + given.lunchMinutes + given.windowSlack;
      const plan: SlotPlan = {
        opens: minute(given.openMinute),
        closes: minute(given.openMinute + given.length),
        slotMinutes: given.slotMinutes,
        ...(given.withRest && {
          rest: { afterMinutes: given.afterMinutes, restMinutes: given.restMinutes },
        }),
        ...(given.withLunch && {
          lunch: {
            minutes: given.lunchMinutes,
            windowFrom: minute(given.windowStart),
            windowTo: minute(windowTo),
          },
        }),
      };
      const result = buildSlots(plan);
      if (!result.ok) {
        expect(result.reason).toBe("no-slot-fits");
        return;
      }
      const { items } = result;
      const [first, last] = [items[0], items.at(-1)];
      expect(first?.from.getTime()).toBeGreaterThanOrEqual(plan.opens.getTime());
      expect(last?.to.getTime()).toBeLessThanOrEqual(plan.closes.getTime());
      expect(last?.kind).toBe("slot");
      expect(longestPlaying(items)).toBeLessThanOrEqual(given.withRest ? given.afterMinutes : 700);
      for (const [index, item] of items.entries()) {
        const previousEnd = items[index - 1]?.to ?? plan.opens;
        // Back to back; only lunch may wait for its window.
        if (item.kind === "lunch") expect(item.from >= previousEnd).toBe(true);
        else expect(item.from).toEqual(previousEnd);
        const length = (item.to.getTime() - item.from.getTime()) / 60_000;
        const wanted = {
          slot: given.slotMinutes,
          hold: 0,
          rest: given.restMinutes,
          lunch: given.lunchMinutes,
        };
        expect(length).toBe(wanted[item.kind]);
        // A rest only where the next slot would have been too much.
        if (item.kind === "rest") {
          const before = items.slice(0, index);
          const lastPause = before.findLastIndex(({ kind }) => kind === "rest" || kind === "lunch");
          const played = (index - lastPause - 1) * given.slotMinutes;
          expect(played + given.slotMinutes).toBeGreaterThan(given.afterMinutes);
        }
      }
      const lunch = items.filter((item) => item.kind === "lunch");
      lunches += lunch.length;
      expect(lunch.length).toBeLessThanOrEqual(1);
      for (const item of lunch) {
        expect(item.from >= minute(given.windowStart) && item.to <= minute(windowTo)).toBe(true);
      }
      // Nobody plays on through the window when lunch was due.
      const openThroughout =
        given.withLunch &&
        plan.opens <= minute(given.windowStart) &&
        plan.closes >= minute(windowTo);
      if (openThroughout && lunch.length === 0) {
        expect(last && last.to <= minute(windowTo - given.lunchMinutes)).toBe(true);
      }
    }),
    { numRuns: 400, seed: 20270320 },
  );
  expect(lunches).toBeGreaterThan(20);
});
