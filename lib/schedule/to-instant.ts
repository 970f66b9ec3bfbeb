import { tzOffset } from "@date-fns/tz";
import type { InstantResult } from "./types";

const MINUTE = 60_000;
const DAY = 86_400_000;
const DATE = /^(\d{4})-(\d{2})-(\d{2})$/;
const TIME = /^([01]\d|2[0-3]):([0-5]\d)$/;

/**
 * The instant of a date and time on the wall clock of a place, whatever the host's own zone.
 *
 * `localDate` is `2027-03-20`, `localTime` is `10:00`, `zone` an IANA name. A time that the clocks skip
 * is read with the offset that held before (it moves forward by what was skipped, note "skipped"); a
 * time that comes twice is its first coming (note "repeated"). Both as in RFC 5545 §3.3.5.
 * Throws a RangeError for a date, time or zone that does not exist.
 */
export function toInstant(localDate: string, localTime: string, zone: string): InstantResult {
  const wall = readWallClock(localDate, localTime);
  const before = offsetAt(zone, new Date(wall - DAY));
  const after = offsetAt(zone, new Date(wall + DAY));

  const matches = [...new Set([before, after])]
    .map((offset) => new Date(wall - offset * MINUTE))
    .filter((instant) => instant.getTime() + offsetAt(zone, instant) * MINUTE === wall)
    .sort((a, b) => a.getTime() - b.getTime());

  const [first, second] = matches;
  if (!first) return { instant: new Date(wall - before * MINUTE), note: "skipped" };
  return second ? { instant: first, note: "repeated" } : { instant: first };
}

/** The wall clock's reading as milliseconds, as if it were UTC. */
function readWallClock(localDate: string, localTime: string): number {
  const wall = Date.parse(`${localDate}T${localTime}:00.000Z`);
  // Date.parse takes 31 February for 3 March in some engines and refuses it in others.
  const exists =
    DATE.test(localDate) &&
    TIME.test(localTime) &&
    !Number.isNaN(wall) &&
    new Date(wall).toISOString().startsWith(localDate);
  if (!exists) throw new RangeError(`There is no such date and time: ${localDate} ${localTime}.`);
  return wall;
}

function offsetAt(zone: string, instant: Date): number {
  const offset = tzOffset(zone, instant);
  if (Number.isNaN(offset)) throw new RangeError(`There is no such time zone: ${zone}.`);
  return offset;
}
