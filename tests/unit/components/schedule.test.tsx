import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, test } from "vitest";
import { CallLadder, waitingOf } from "@/components/schedule/call-ladder";
import { DayColumns } from "@/components/schedule/day-columns";
import { eventKinds } from "@/components/schedule/note-shape";
import {
  STAVE_HEIGHT,
  heightOnStave,
  placeInWeeks,
  placeStaves,
} from "@/components/schedule/season-layout";
import { SeasonStaves } from "@/components/schedule/season-staves";

const weeks = [
  { number: 10, start: "2027-03-08", label: "8 Mar" },
  { number: 11, start: "2027-03-15", label: "15 Mar" },
  { number: 13, start: "2027-03-29", label: "29 Mar" },
];

describe("where a call stands on the season's staves", () => {
  test("morning on the top line, late evening on the bottom one, nothing beyond them", () => {
    expect(heightOnStave(9 * 60)).toBe(0);
    expect(heightOnStave(22 * 60)).toBe(STAVE_HEIGHT);
    expect(heightOnStave(6 * 60)).toBe(0);
    expect(heightOnStave(23 * 60 + 30)).toBe(STAVE_HEIGHT);
    expect(heightOnStave(19 * 60 + 30)).toBeGreaterThan(heightOnStave(14 * 60));
  });

  test("days go through the week from bar line to bar line", () => {
    expect(placeInWeeks(weeks, "2027-03-08", 720)).toBeCloseTo(0.5 / 7, 6);
    expect(placeInWeeks(weeks, "2027-03-14", 720)).toBeCloseTo(6.5 / 7, 6);
    expect(placeInWeeks(weeks, "2027-03-15", 720)).toBeCloseTo(1 + 0.5 / 7, 6);
  });

  test("a week that is not drawn has no place, nor has a day before the season", () => {
    expect(placeInWeeks(weeks, "2027-03-24")).toBeNull();
    expect(placeInWeeks(weeks, "2027-03-07")).toBeNull();
    // 28 March 2027 is a clock change in Europe; the day after it is still a Monday in its week.
    expect(placeInWeeks(weeks, "2027-03-29", 720)).toBeCloseTo(2 + 0.5 / 7, 6);
  });

  test("two calls of one day stand beside each other, in order, inside their day", () => {
    const morning = placeInWeeks(weeks, "2027-03-10", 600) ?? NaN;
    const evening = placeInWeeks(weeks, "2027-03-10", 1170) ?? NaN;
    expect(morning).toBeLessThan(evening);
    expect(morning).toBeGreaterThan(2 / 7);
    expect(evening).toBeLessThan(3 / 7);
  });

  test("staves stand below each other without overlapping", () => {
    const { groups, height } = placeStaves([
      {
        label: "One",
        productions: [
          { id: "a", title: "A", events: [] },
          { id: "b", title: "B", events: [] },
        ],
      },
      { label: "Two", productions: [{ id: "c", title: "C", events: [] }] },
    ]);
    const tops = groups.flatMap((group) => group.productions.map((p) => p.staveTop));
    expect(tops).toHaveLength(3);
    for (const [index, top] of tops.entries()) {
      if (index > 0) expect(top - (tops[index - 1] ?? NaN)).toBeGreaterThan(STAVE_HEIGHT);
    }
    expect(height).toBeGreaterThan((tops.at(-1) ?? NaN) + STAVE_HEIGHT);
  });
});

describe("a season drawn", () => {
  const html = renderToStaticMarkup(
    <SeasonStaves
      label="Spring season"
      today="2027-03-11"
      weeks={weeks}
      groups={[
        {
          label: "Lantern Street Theatre",
          productions: [
            {
              id: "t",
              title: "The Tidewatcher",
              events: eventKinds.map((kind, index) => ({
                id: kind,
                kind,
                localDate: `2027-03-${String(8 + index).padStart(2, "0")}`,
                minutesOfDay: 600,
                label: `${kind} in Room 2`,
              })),
            },
          ],
        },
        {
          label: "Fenmoor Conservatory",
          productions: [{ id: "f", title: "A Fair at Candlemas", events: [] }],
        },
      ]}
      clashes={[
        {
          localDate: "2027-03-10",
          minutesOfDay: 600,
          productionIds: ["t", "f"],
          label: "two places at once",
        },
      ]}
    />,
  );

  test("every call is a note with words, and a row of the table", () => {
    for (const kind of eventKinds) {
      expect(html).toContain(`<title>${kind} in Room 2</title>`);
      expect(html.split(`: ${kind} in Room 2</td>`)).toHaveLength(2);
    }
  });

  test("a clash is circled from stave to stave and told in the table", () => {
    const circle = /<title>two places at once<\/title><rect[^>]*height="(\d+(?:\.\d+)?)"/.exec(
      html,
    );
    expect(Number(circle?.[1])).toBeGreaterThan(STAVE_HEIGHT);
    expect(html).toContain("The Tidewatcher and A Fair at Candlemas");
    expect(html).toContain("Clash: two places at once");
  });

  test("today is written, and the wide part can be reached by keyboard", () => {
    expect(html).toContain(">today</text>");
    expect(html).toMatch(/role="region"[^>]*tabindex="0"/);
  });
});

describe("one call", () => {
  const blocks = [
    { id: "13", number: "13", title: "Bet’s Ledger", start: 1110, minutes: 25 },
    { id: "7", number: "7", title: "What the Gulls Know", start: 1135, minutes: 20 },
    { id: "4", number: "4", title: "Tide Table", start: 1155, minutes: 30 },
    { id: "18", number: "18", title: "Lamps Out", start: 1200, minutes: 20 },
  ];

  test("waiting is what lies between first and last block, not before or after, nor the break", () => {
    expect(waitingOf(blocks, ["13", "18"])).toEqual([
      { start: 1135, minutes: 20 },
      { start: 1155, minutes: 30 },
    ]);
    expect(waitingOf(blocks, ["7", "4"])).toEqual([]);
    expect(waitingOf(blocks, [])).toEqual([]);
  });

  test("says in words who is needed in what, and how long they wait", () => {
    const html = renderToStaticMarkup(
      <CallLadder
        label="Music call"
        blocks={blocks}
        rows={[
          { id: "b", name: "Old Bet", blockIds: ["13", "18"] },
          { id: "p", name: "Pip", blockIds: [] },
        ]}
      />,
    );
    expect(html).toContain("needed in 13 Bet’s Ledger, 18 Lamps Out; waits 50 min");
    expect(html).toContain("not needed");
  });
});

test("a short slot is still tall enough for a mouse and for a finger", () => {
  // 24 and 44 CSS px: WCAG 2.2, success criteria 2.5.8 and 2.5.5.
  const html = renderToStaticMarkup(
    <DayColumns
      label="Saturday"
      from={600}
      to={660}
      now={612}
      rooms={[{ id: "a", label: "Room A", slots: [{ id: "s", start: 600, end: 605 }] }]}
      renderSlot={(slot) => <b>{slot.id}</b>}
    />,
  );
  const wide = Number(/--ppm-wide:([\d.]+)/.exec(html)?.[1]);
  const phone = Number(/--ppm-phone:([\d.]+)/.exec(html)?.[1]);
  expect(wide * 5).toBeGreaterThanOrEqual(24);
  expect(phone * 5).toBeGreaterThanOrEqual(44);
  expect(html).toContain("It is now 10:12");
});
