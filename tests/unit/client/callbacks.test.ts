import { describe, expect, test } from "vitest";
import { asJson } from "@/lib/client/as-json";
import {
  countAnswers,
  isShown,
  previewInWords,
  whyNotYet,
  withMark,
  type Draft,
  type DraftSinger,
  type Shown,
} from "@/lib/client/callbacks";
import { matches } from "@/lib/client/matches";
import { Refusal, orRefuse } from "@/lib/client/refusal";

// The expected values are counted by hand from the product's own rules.

const singer = (name: string, extra: Partial<DraftSinger> = {}): DraftSinger => ({
  personId: name,
  name,
  minor: false,
  song: null,
  asksFor: null,
  withdrawn: false,
  range: null,
  fits: [
    { verdict: "out", words: "4 short at top" },
    { verdict: null, words: "Role has no line yet" },
  ],
  marks: [],
  sent: null,
  unsent: "none",
  ...extra,
});

const round: NonNullable<Draft["round"]> = {
  id: "round",
  title: "Callbacks",
  startsAt: "2027-03-23T18:00:00.000Z",
  endsAt: "2027-03-23T21:00:00.000Z",
  zone: "Europe/London",
  roomId: null,
  room: null,
  material: null,
  issue: 0,
  publishedAt: null,
  version: 1,
};

const draft: Draft = {
  round,
  roles: [
    { id: "maren", name: "Maren", line: { low: 58, high: 81 } },
    { id: "bet", name: "Old Bet", line: null },
  ],
  singers: [
    singer("Wren", { marks: ["bet"], sent: { answer: "yes" }, unsent: "changed" }),
    singer("Dele", { sent: { answer: null } }),
    singer("Ottoline", {
      fits: [
        { verdict: "fits", words: "Fits" },
        { verdict: "stretch", words: "2 short below" },
      ],
    }),
  ],
  may: { mark: true, publish: true },
  mayHear: true,
  preview: { told: 1, unchanged: 0, takenOff: 1 },
};

test("a mark stands once however often it is set, and comes off", () => {
  const on = withMark(draft, { personId: "Wren", roleId: "maren", on: true });
  expect(on.singers[0]?.marks).toEqual(["bet", "maren"]);
  expect(withMark(on, { personId: "Wren", roleId: "maren", on: true }).singers[0]?.marks).toEqual([
    "bet",
    "maren",
  ]);
  expect(withMark(on, { personId: "Wren", roleId: "bet", on: false }).singers[0]?.marks).toEqual([
    "maren",
  ]);
  expect(draft.singers[0]?.marks).toEqual(["bet"]);
});

describe("what is shown", () => {
  const shown = (kind: Shown, inView = draft.roles) =>
    draft.singers.filter((s) => isShown(s, draft.roles, inView, kind)).map((s) => s.name);
  const [maren, bet] = draft.roles;

  test.each([
    ["everyone", ["Wren", "Dele", "Ottoline"]],
    ["marked", ["Wren"]],
    ["fits", ["Ottoline"]],
    ["stretch", ["Ottoline"]],
    ["unsent", ["Wren"]],
  ] as const)("%s", (kind, names) => {
    expect(shown(kind)).toEqual(names);
  });

  test("only the roles in view count", () => {
    expect(shown("marked", maren ? [maren] : [])).toEqual([]);
    expect(shown("fits", bet ? [bet] : [])).toEqual([]);
    expect(shown("stretch", bet ? [bet] : [])).toEqual(["Ottoline"]);
  });
});

test("answers are counted among those who were told", () => {
  expect(countAnswers(draft)).toEqual({ sent: 2, yes: 1, no: 0, open: 1 });
});

test.each([
  [{ told: 9, unchanged: 2, takenOff: 1 }, "9 people are told, 2 unchanged, 1 taken off."],
  [{ told: 1, unchanged: 0, takenOff: 0 }, "1 person is told."],
  [{ told: 0, unchanged: 3, takenOff: 1 }, "0 people are told, 3 unchanged, 1 taken off."],
])("%j reads %s", (preview, words) => {
  expect(previewInWords(preview)).toBe(words);
});

test("says what stands in the way of publishing", () => {
  expect(whyNotYet(draft)).toBeNull();
  expect(whyNotYet({ ...draft, round: null })).toContain("Begin a round");
  expect(whyNotYet({ ...draft, round: { ...round, startsAt: null } })).toContain("Say when");
  expect(whyNotYet({ ...draft, singers: [singer("Wren")] })).toContain("Tick who");
  expect(
    whyNotYet({ ...draft, singers: [singer("Wren", { marks: ["bet"], withdrawn: true })] }),
  ).toContain("Tick who");
});

test.each([
  ["Ciarán Obuya", "ciaran", true],
  ["Ciarán Obuya", "OBUYA cia", true],
  ["Ciarán Obuya", "", true],
  ["Ciarán Obuya", "obuya junia", false],
])("%s is found by “%s”: %s", (text, typed, found) => {
  expect(matches(text, typed)).toBe(found);
});

test("dates become ISO text, as a route would send them", () => {
  expect(asJson({ at: new Date("2027-03-23T18:00:00Z"), deep: [{ at: null }] })).toEqual({
    at: "2027-03-23T18:00:00.000Z",
    deep: [{ at: null }],
  });
});

describe("an action's answer", () => {
  test("gives its data, or fails with the refusal's own words", async () => {
    await expect(orRefuse(Promise.resolve({ ok: true, data: 3 }))).resolves.toBe(3);
    const refused = orRefuse(
      Promise.resolve({ ok: false, error: { code: "stale", message: "Look again." } }),
    );
    await expect(refused).rejects.toMatchObject({ code: "stale", message: "Look again." });
    await expect(refused).rejects.toBeInstanceOf(Refusal);
  });

  test("that never arrives fails with what to do", async () => {
    await expect(orRefuse(Promise.reject(new TypeError("offline")))).rejects.toMatchObject({
      code: "no-answer",
    });
  });
});
