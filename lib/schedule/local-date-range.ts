import { toInstant } from "./to-instant";
import type { Interval } from "./types";

/**
 * A whole day on the calendar of a place, from its first instant to the first of the next day: 23 or
 * 25 hours where the clocks change. `localDate` is `2027-03-28`, `zone` an IANA name.
 * Throws a RangeError for a date or zone that does not exist.
 */
export function localDateRange(localDate: string, zone: string): Interval {
  const from = toInstant(localDate, "00:00", zone).instant;
  const nextDate = new Date(Date.parse(`${localDate}T00:00:00Z`) + 86_400_000);
  return { from, to: toInstant(nextDate.toISOString().slice(0, 10), "00:00", zone).instant };
}
