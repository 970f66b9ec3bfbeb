import { describe, expect, test } from "vitest";
import { waitingMinutes } from "@/lib/calls/waiting-minutes";

const block = (kind: "number" | "break", minutes: number, ...people: string[]) => ({
  kind,
  minutes,
  called: people.map((personId) => ({
    personId: personId.replace("!", ""),
    roleNames: [],
    source: "score" as const,
    reason: null,
    excused: personId.endsWith("!"),
  })),
});

// Worked by hand: the definition is this product's own.
describe("minutes people wait in a call", () => {
  test("count between the first and the last block of each", () => {
    expect(
      waitingMinutes([
        block("number", 30, "a", "b"),
        block("number", 20, "b"),
        block("number", 40, "c"),
        block("number", 15, "a", "b"),
      ]),
    ).toBe(60 + 40);
  });

  test("leave out breaks, late comers, early leavers and those who are excused", () => {
    expect(
      waitingMinutes([
        block("number", 30, "a"),
        block("break", 15),
        block("number", 20, "a", "b!"),
        block("number", 40, "c"),
        block("number", 10, "b"),
      ]),
    ).toBe(0);
    expect(waitingMinutes([])).toBe(0);
  });
});
