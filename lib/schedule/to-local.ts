import { tzOffset } from "@date-fns/tz";
import type { LocalTime } from "./types";

/**
 * What a wall clock in a place shows at an instant: `{date: "2027-03-20", time: "10:00"}`, whole
 * minutes, seconds dropped, whatever the host's own zone. `zone` is an IANA name.
 * Throws a RangeError for an unknown zone or an invalid date.
 */
export function toLocal(instant: Date, zone: string): LocalTime {
  const offset = tzOffset(zone, instant);
  if (Number.isNaN(offset)) throw new RangeError(`There is no such time zone or date: ${zone}.`);
  const wall = new Date(instant.getTime() + offset * 60_000).toISOString();
  return { date: wall.slice(0, 10), time: wall.slice(11, 16) };
}
