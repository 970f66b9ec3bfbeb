import { describe, expect, test } from "vitest";
import { asText, clashInWords, namesInWords } from "@/app/(season)/season/_components/clash-words";
import { findNeeds } from "@/app/(season)/season/_components/needs";
import { seasonWindow } from "@/app/(season)/season/_components/season-window";
import { toStaves, whatComes } from "@/app/(season)/season/_components/to-staves";
import type { Season } from "@/lib/data/season";
import type {
  SeasonClash,
  SeasonEvent,
  SeasonProduction,
  SeasonProgress,
} from "@/lib/data/season/types";

const NOW = new Date("2027-03-11T12:00:00Z");
const SEES = { score: true, auditions: true, callbacks: true, casting: true, conflicts: true };

function production(id: string, over: Partial<SeasonProduction> = {}): SeasonProduction {
  return {
    id,
    title: id,
    companyId: "lantern",
    companyName: "Lantern Street Theatre",
    stage: "rehearsals",
    opensOn: null,
    closesOn: null,
    zone: "Europe/London",
    positions: ["music_director"],
    castPublished: false,
    sees: SEES,
    leads: true,
    plans: true,
    ...over,
  };
}

function event(id: string, productionId: string, over: Partial<SeasonEvent> = {}): SeasonEvent {
  return {
    id,
    productionId,
    kind: "music",
    from: new Date("2027-03-21T14:00:00Z"),
    to: new Date("2027-03-21T16:00:00Z"),
    zone: "Europe/London",
    room: null,
    draft: false,
    ...over,
  };
}

function clash(over: Partial<SeasonClash> = {}): SeasonClash {
  return {
    id: "c",
    kind: "person",
    who: ["Wren Tallis"],
    from: new Date("2027-03-21T14:00:00Z"),
    to: new Date("2027-03-21T16:00:00Z"),
    zone: "Europe/London",
    eventIds: ["a", "b"],
    elsewhere: false,
    short: null,
    ...over,
  };
}

function season(over: Partial<Season> = {}): Season {
  return {
    productions: [production("Tidewatcher"), production("Candlemas", { companyId: "fenmoor" })],
    events: [event("a", "Tidewatcher", { kind: "audition" }), event("b", "Candlemas")],
    clashes: [],
    elsewhere: [],
    progress: [],
    ...over,
  };
}

describe("the weeks of a season", () => {
  test("begin on the Monday of last week and carry their ISO numbers", () => {
    // 11 March 2027 is a Thursday in week 10 (ISO 8601; checked with `date -d 2027-03-11 +%A,%V`).
    const window = seasonWindow(undefined, "2027-03-11", "Europe/London");
    expect(window.start).toBe("2027-03-01");
    expect(window.weeks[1]).toEqual({ number: 10, start: "2027-03-08", label: "8 Mar" });
    expect(window.weeks).toHaveLength(9);
  });

  test("cover whole local days, across the change of clocks", () => {
    const { from, to } = seasonWindow("2027-03-24", "2027-03-11", "Europe/London");
    expect(from.toISOString()).toBe("2027-03-22T00:00:00.000Z");
    // Nine weeks on, London keeps summer time: the last day ends at 23:00 UTC.
    expect(to.toISOString()).toBe("2027-05-23T23:00:00.000Z");
  });

  test.each(["2027-02-30", "soon", "9999-01-01", ""])("%j is no day to begin with", (from) => {
    expect(seasonWindow(from, "2027-03-11", "UTC").start).toBe("2027-03-01");
  });

  test("earlier and later lead four weeks back and on", () => {
    const { earlier, later } = seasonWindow("2027-03-01", "2027-03-11", "UTC");
    expect([earlier, later]).toEqual(["2027-02-01", "2027-03-29"]);
  });
});

describe("a clash in words", () => {
  test.each([
    [{}, "Wren Tallis has to be at the auditions of Tidewatcher and at a music call of Candlemas."],
    [
      { who: ["You", "Wren Tallis"] },
      "You and Wren Tallis have to be at the auditions of Tidewatcher and at a music call of Candlemas.",
    ],
    [
      { eventIds: ["b"], elsewhere: true },
      "Wren Tallis has to be at a music call of Candlemas and is engaged elsewhere.",
    ],
    [
      { kind: "room" as const, who: ["Room 1"] },
      "Room 1 is taken twice: by the auditions of Tidewatcher and by a music call of Candlemas.",
    ],
    [
      { kind: "conflict" as const, eventIds: ["b"] },
      "Wren Tallis said that they cannot attend a music call of Candlemas then.",
    ],
    [
      { kind: "travel" as const, short: 25 },
      "Wren Tallis has 25 min too little for the way from the auditions of Tidewatcher to a music call of Candlemas.",
    ],
  ])("%j", (over, words) => {
    expect(asText(clashInWords(clash(over), season()))).toBe(words);
  });

  test("names two and counts the rest", () => {
    expect(namesInWords(["A", "B", "C"])).toBe("A, B and 1 other");
    expect(namesInWords(["A", "B", "C", "D"])).toBe("A, B and 2 others");
  });
});

describe("what needs you", () => {
  const progress = (over: Partial<SeasonProgress> = {}): SeasonProgress => ({
    productionId: "Tidewatcher",
    roles: { all: 8, cast: 6 },
    signUps: { all: 40, unplaced: 3, roomsWithoutPianist: 1 },
    unanswered: 1,
    ...over,
  });
  const said = (s: Season) => findNeeds(s, NOW).map((need) => asText(need.words));

  test("a clash comes first, with the link to the call that can be moved", () => {
    const [need] = findNeeds(season({ clashes: [clash()], progress: [progress()] }), NOW);
    expect(need?.act).toEqual({
      label: "Move the call",
      href: "/productions/Candlemas/rehearsals/b",
    });
  });

  test("only the call of a production whose calls one plans is offered to be moved", () => {
    const productions = [
      production("Tidewatcher"),
      production("Candlemas", { plans: false, leads: false }),
    ];
    const [need] = findNeeds(season({ productions, clashes: [clash()] }), NOW);
    expect(need?.act).toEqual({
      label: "See the day",
      href: "/productions/Tidewatcher/auditions/a",
    });
  });

  test("what is over needs nobody", () => {
    const over = clash({
      from: new Date("2027-03-10T14:00:00Z"),
      to: new Date("2027-03-10T16:00:00Z"),
    });
    expect(findNeeds(season({ clashes: [over] }), NOW)).toEqual([]);
  });

  test("each lack is asked at its stage, of those who can mend it", () => {
    const at = (over: Partial<SeasonProduction>) =>
      said(season({ productions: [production("Tidewatcher", over)], progress: [progress()] }));
    expect(at({ stage: "auditions" })).toEqual([
      "1 audition room of Tidewatcher has no pianist.",
      "3 singers signed up for Tidewatcher have no slot.",
      "1 callback of Tidewatcher has no answer yet.",
    ]);
    expect(at({ stage: "casting" })).toContain("2 of 8 roles in Tidewatcher are not cast.");
    expect(at({ stage: "auditions", leads: false })).not.toContain(
      "1 audition room of Tidewatcher has no pianist.",
    );
    expect(at({ stage: "casting", leads: false, plans: false })).toEqual([]);
  });

  test("what one may not see is not counted", () => {
    expect(
      said(season({ progress: [progress({ roles: null, signUps: null, unanswered: null })] })),
    ).toEqual([]);
  });
});

describe("the staves", () => {
  test("stand by company; a clash goes across the productions it is in", () => {
    const drawn = toStaves(
      season({
        productions: [
          production("Tidewatcher"),
          production("Candlemas", { companyId: "fenmoor", companyName: "Fenmoor Conservatory" }),
        ],
        clashes: [clash()],
      }),
      NOW,
    );
    expect(drawn.groups.map((group) => [group.label, group.productions.length])).toEqual([
      ["Lantern Street Theatre", 1],
      ["Fenmoor Conservatory", 1],
    ]);
    expect(drawn.clashes[0]).toMatchObject({
      localDate: "2027-03-21",
      minutesOfDay: 14 * 60,
      productionIds: ["Tidewatcher", "Candlemas"],
    });
  });

  test("say the hour of the wall clock, in summer time too", () => {
    const { groups } = toStaves(
      season({
        events: [
          event("a", "Tidewatcher", {
            from: new Date("2027-04-01T17:30:00Z"),
            to: new Date("2027-04-01T20:00:00Z"),
            room: "Room 2",
            draft: true,
          }),
        ],
      }),
      NOW,
    );
    expect(groups[0]?.productions[0]?.events[0]).toMatchObject({
      localDate: "2027-04-01",
      minutesOfDay: 18 * 60 + 30,
      label: "Music call, 18:30–21:00, Room 2, not published yet",
    });
  });

  test.each([
    [{ stage: "planning" as const }, "Planning"],
    [{ opensOn: "2027-04-02" }, "Opens Fri 2 Apr"],
    [{ opensOn: "2027-03-01", closesOn: "2027-03-20" }, "Runs to Sat 20 Mar"],
  ])("%j comes to: %s", (over, words) => {
    expect(whatComes(production("Tidewatcher", over), [], NOW)).toBe(words);
  });
});
