import { expect, test } from "vitest";
import {
  clock,
  clockSpan,
  dayAndClock,
  dayOfYear,
  daysOrClocks,
  localDay,
  longDay,
  shortDay,
} from "@/lib/format-dates";

// Days of the week checked against the perpetual calendar: 20 March 2027 is a Saturday.
test("a local date is written the same whatever zone the host is in", () => {
  expect(longDay("2027-03-20")).toBe("Saturday 20 March");
  expect(shortDay("2027-03-20")).toBe("Sat 20 Mar");
  expect(dayOfYear("2027-03-20")).toBe("20 Mar 2027");
});

test("an instant is shown by the wall clock of its place, on both sides of a clock change", () => {
  // Europe/London goes from UTC+0 to UTC+1 on 28 March 2027 at 01:00 UTC (IANA time zone database).
  expect(clock(new Date("2027-03-27T18:00:00Z"), "Europe/London")).toBe("18:00");
  expect(clock(new Date("2027-03-28T18:00:00Z"), "Europe/London")).toBe("19:00");
  expect(localDay(new Date("2027-03-20T23:30:00Z"), "Asia/Kolkata")).toBe("2027-03-21");
  expect(dayAndClock(new Date("2027-03-20T23:30:00Z"), "Asia/Kolkata")).toBe("Sun 21 Mar, 05:00");
});

test("a stretch past midnight says on which day it ends; midnight itself belongs to the evening", () => {
  expect(
    clockSpan(new Date("2027-01-04T22:00:00Z"), new Date("2027-01-05T00:30:00Z"), "Europe/London"),
  ).toBe("22:00–00:30 (Tue 5 Jan)");
  expect(
    clockSpan(new Date("2027-01-04T22:00:00Z"), new Date("2027-01-05T00:00:00Z"), "Europe/London"),
  ).toBe("22:00–00:00");
});

test("days that are taken whole are named, not given as midnight to midnight", () => {
  // The clocks go forward on 28 March 2027: that day has 23 hours and is still one day.
  const span = (from: string, to: string) =>
    daysOrClocks(new Date(from), new Date(to), "Europe/London");
  expect(span("2027-03-20T00:00:00Z", "2027-03-21T00:00:00Z")).toBe("on Sat 20 Mar");
  expect(span("2027-03-27T00:00:00Z", "2027-03-28T23:00:00Z")).toBe(
    "from Sat 27 Mar to Sun 28 Mar",
  );
  expect(span("2027-03-20T18:00:00Z", "2027-03-20T19:00:00Z")).toBe("18:00–19:00");
});
