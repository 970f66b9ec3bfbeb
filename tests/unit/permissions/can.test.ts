import { describe, expect, test } from "vitest";
import { ACTIONS, can } from "@/lib/permissions/can";
import type { Action } from "@/lib/permissions/can";
import { POSITION_KINDS } from "@/lib/permissions/position-kinds";
import type { Actor, PositionKind } from "@/lib/permissions/types";

// The table is the product's own: who may do what in a production (M music director, A assistant, S stage manager,
// T the table, P accompanist, C actor, O company admin, who holds the position in the company).
const LETTERS: Record<PositionKind, string> = {
  music_director: "M",
  assistant_md: "A",
  stage_manager: "S",
  director: "T",
  choreographer: "T",
  producer: "T",
  accompanist: "P",
  actor: "C",
  company_admin: "O",
};
const TABLE: Record<Action, string> = {
  "production:create": "O",
  "production:see": "MASTPCO",
  "production:change": "MA",
  "score:read": "MASTO",
  "score:change": "MA",
  "auditions:read": "MAST",
  "auditions:plan": "MAS",
  "sign-up:change": "MAS",
  "door:run": "MAS",
  "range:hear": "MAT",
  "callbacks:draft": "MAT",
  "callbacks:read": "MAST",
  "callbacks:publish": "MA",
  "casting:see": "MAT",
  "casting:choose": "MA",
  "calls:read": "MASTO",
  "calls:change": "MAS",
  "conflicts:read": "MAS",
  "conflicts:agree": "MAS",
  "sheets:issue": "MAS",
  "sheets:read": "MASTO",
  "contacts:read": "MASO",
  "people:read": "MASTO",
  "pianists:see": "MASO",
  "pianists:assign": "MA",
  "positions:manage": "MO",
  "company:see": "MASTPCO",
  "rooms:manage": "MSO",
  "members:manage": "O",
  "trail:read": "MASO",
  "own:change": "",
};

const holder = (kind: PositionKind): Actor => ({
  userId: "u",
  email: "e@people.example",
  name: "N",
  people: [{ id: "me", companyId: "company" }],
  positions: [
    {
      kind,
      companyId: "company",
      productionId: kind === "company_admin" ? null : "production",
      personId: "me",
    },
  ],
});

describe.each(ACTIONS)("%s", (action) => {
  test.each(POSITION_KINDS)("asked by: %s", (kind) => {
    const expected = TABLE[action].includes(LETTERS[kind]);
    expect(can(holder(kind), action, { companyId: "company", productionId: "production" })).toBe(
      expected,
    );
  });

  test("nobody, and nobody's position in another company or production, may", () => {
    expect(can(null, action, { companyId: "company", productionId: "production" })).toBe(false);
    for (const kind of POSITION_KINDS) {
      expect(
        can(holder(kind), action, { companyId: "elsewhere", productionId: "production" }),
      ).toBe(false);
      const acrossTheCompany: Action[] = ["company:see", "rooms:manage"];
      if (kind !== "company_admin" && !acrossTheCompany.includes(action)) {
        expect(can(holder(kind), action, { companyId: "company", productionId: "another" })).toBe(
          false,
        );
      }
    }
  });
});

test("a person may change their own row, and only theirs", () => {
  expect(can(holder("actor"), "own:change", { companyId: "company", personId: "me" })).toBe(true);
  expect(can(holder("actor"), "own:change", { companyId: "company", personId: "someone" })).toBe(
    false,
  );
  expect(
    can(holder("music_director"), "own:change", {
      companyId: "company",
      productionId: "production",
      personId: "someone",
    }),
  ).toBe(false);
});

test("the stage manager sees the casting grid once the cast is published", () => {
  const subject = { companyId: "company", productionId: "production" };
  expect(can(holder("stage_manager"), "casting:see", { ...subject, castPublished: false })).toBe(
    false,
  );
  expect(can(holder("stage_manager"), "casting:see", { ...subject, castPublished: true })).toBe(
    true,
  );
  expect(can(holder("actor"), "casting:see", { ...subject, castPublished: true })).toBe(false);
});

test("someone with positions in two productions has in each only what that position gives", () => {
  const both = holder("music_director");
  both.positions.push({
    kind: "actor",
    companyId: "company",
    productionId: "second",
    personId: "me",
  });
  expect(can(both, "casting:choose", { companyId: "company", productionId: "production" })).toBe(
    true,
  );
  expect(can(both, "casting:choose", { companyId: "company", productionId: "second" })).toBe(false);
});
