/** How dates and times are written for people: 24 hours, in the zone where it happens. */

const cache = new Map<string, Intl.DateTimeFormat>();

function format(locale: string, options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
  const key = locale + JSON.stringify(options);
  let made = cache.get(key);
  if (!made) {
    made = new Intl.DateTimeFormat(locale, options);
    cache.set(key, made);
  }
  return made;
}

// A local date has no zone: it is read and written at noon UTC, where no offset can move it to another day.
const noon = (localDate: string): Date => new Date(`${localDate}T12:00:00Z`);
const join = (locale: string, options: Intl.DateTimeFormatOptions, at: Date): string =>
  format(locale, options).format(at).replaceAll(",", "");

/** "Saturday 20 March" from "2027-03-20". */
export function longDay(localDate: string, locale = "en-GB"): string {
  return join(
    locale,
    { weekday: "long", day: "numeric", month: "long", timeZone: "UTC" },
    noon(localDate),
  );
}

/** "Sat 20 Mar". */
export function shortDay(localDate: string, locale = "en-GB"): string {
  return join(
    locale,
    { weekday: "short", day: "numeric", month: "short", timeZone: "UTC" },
    noon(localDate),
  );
}

/** "20 Mar 2027". */
export function dayOfYear(localDate: string, locale = "en-GB"): string {
  return join(
    locale,
    { day: "numeric", month: "short", year: "numeric", timeZone: "UTC" },
    noon(localDate),
  );
}

/** "18:40", as a wall clock in the zone shows it. */
export function clock(at: Date, zone: string): string {
  return format("en-GB", {
    hour: "2-digit",
    minute: "2-digit",
    hourCycle: "h23",
    timeZone: zone,
  }).format(at);
}

/** "2027-03-20", the local day of an instant. */
export function localDay(at: Date, zone: string): string {
  return format("en-CA", {
    year: "numeric",
    month: "2-digit",
    day: "2-digit",
    timeZone: zone,
  }).format(at);
}

/** "Sat 20 Mar, 18:40". */
export function dayAndClock(at: Date, zone: string, locale = "en-GB"): string {
  return `${shortDay(localDay(at, zone), locale)}, ${clock(at, zone)}`;
}

/** "18:40–19:30"; a stretch that ends on another day says so. */
export function clockSpan(from: Date, to: Date, zone: string): string {
  const end = clock(to, zone);
  const later =
    localDay(from, zone) === localDay(to, zone) || end === "00:00"
      ? ""
      : ` (${shortDay(localDay(to, zone))})`;
  return `${clock(from, zone)}–${end}${later}`;
}

/** "18:40–19:30"; whole days by name: "on Sat 20 Mar", "from Sat 20 Mar to Mon 22 Mar". */
export function daysOrClocks(from: Date, to: Date, zone: string): string {
  if (clock(from, zone) !== "00:00" || clock(to, zone) !== "00:00")
    return clockSpan(from, to, zone);
  const first = localDay(from, zone);
  const last = localDay(new Date(to.getTime() - 1), zone);
  return first === last ? `on ${shortDay(first)}` : `from ${shortDay(first)} to ${shortDay(last)}`;
}
