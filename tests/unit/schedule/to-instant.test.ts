import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import { localDateRange } from "@/lib/schedule/local-date-range";
import { minutesBetween } from "@/lib/schedule/minutes-between";
import { toInstant } from "@/lib/schedule/to-instant";
import { toLocal } from "@/lib/schedule/to-local";
import wallClocks from "../../fixtures/schedule/wall-clocks.json";

const hosts = [
  { zone: "UTC", winterOffset: 0 },
  { zone: "Asia/Kolkata", winterOffset: -330 },
  { zone: "America/New_York", winterOffset: 300 },
  { zone: "Pacific/Kiritimati", winterOffset: -840 },
];

describe.each(hosts)("on a host in $zone", ({ zone: host, winterOffset }) => {
  beforeEach(() => {
    vi.stubEnv("TZ", host);
  });
  afterEach(() => {
    vi.unstubAllEnvs();
  });

  test("the host's zone is the one set", () => {
    expect(new Date("2027-01-15T12:00:00Z").getTimezoneOffset()).toBe(winterOffset);
  });

  // Source: Python's zoneinfo (tests/fixtures/schedule/README.md).
  test("every wall clock of the reference has its instant and note", () => {
    expect(wallClocks.length).toBeGreaterThan(300);
    for (const [zone = "", date = "", time = "", instant, note] of wallClocks) {
      const found = toInstant(date, time, zone);
      expect([zone, date, time, found.instant.toISOString(), found.note]).toEqual([
        zone,
        date,
        time,
        instant,
        note,
      ]);
    }
  });

  test("a wall clock that exists reads back as it was written", () => {
    for (const [zone = "", date = "", time = "", instant = "", note] of wallClocks) {
      if (note !== "skipped") expect(toLocal(new Date(instant), zone)).toEqual({ date, time });
    }
  });

  // Source: RFC 5545 §3.3.5, the two examples for America/New_York in 2007.
  test("the calendar standard's own examples", () => {
    const skipped = toInstant("2007-03-11", "02:30", "America/New_York");
    expect(skipped).toEqual({ instant: new Date("2007-03-11T03:30:00-04:00"), note: "skipped" });
    const repeated = toInstant("2007-11-04", "01:30", "America/New_York");
    expect(repeated).toEqual({ instant: new Date("2007-11-04T01:30:00-04:00"), note: "repeated" });
  });

  test("a whole day has 23, 24 or 25 hours", () => {
    const hours = (date: string) => {
      const { from, to } = localDateRange(date, "Europe/London");
      return minutesBetween(from, to) / 60;
    };
    expect(["2027-03-27", "2027-03-28", "2027-10-31"].map(hours)).toEqual([24, 23, 25]);
  });
});

// Derived in the trade notes from a rule of 11 hours overnight: elapsed hours, not the clock face.
test("a night across a clock change has its elapsed hours", () => {
  const elapsed = (from: [string, string], to: [string, string]) =>
    minutesBetween(
      toInstant(...from, "Europe/London").instant,
      toInstant(...to, "Europe/London").instant,
    );
  expect(elapsed(["2027-03-27", "23:00"], ["2027-03-28", "10:00"])).toBe(10 * 60);
  expect(elapsed(["2027-10-30", "23:00"], ["2027-10-31", "09:00"])).toBe(11 * 60);
});

test.each([
  ["2027-02-29", "10:00", "Europe/London"],
  ["2027-13-01", "10:00", "Europe/London"],
  ["20 March 2027", "10:00", "Europe/London"],
  ["2027-03-20", "24:00", "Europe/London"],
  ["2027-03-20", "9:00", "Europe/London"],
  ["2027-03-20", "10:00", "Europe/Atlantis"],
  ["2027-03-20", "10:00", ""],
])("%s %s in %s is refused", (date, time, zone) => {
  expect(() => toInstant(date, time, zone)).toThrow(RangeError);
});

test("an unknown zone or an invalid date has no local time", () => {
  expect(() => toLocal(new Date("2027-03-20T10:00:00Z"), "Europe/Atlantis")).toThrow(RangeError);
  expect(() => toLocal(new Date(Number.NaN), "Europe/London")).toThrow(RangeError);
});
