import { getISOWeek } from "date-fns";
import type { SeasonWeek } from "@/components/schedule/season-types";
import type { Interval } from "@/lib/schedule/types";
import { localDateRange } from "@/lib/schedule/local-date-range";

/** As many bars as stand on a wide page without scrolling. */
const WEEKS = 9;

const DAY_MS = 86_400_000;
const monthDay = new Intl.DateTimeFormat("en-GB", {
  day: "numeric",
  month: "short",
  timeZone: "UTC",
});

export type SeasonWindow = Interval & {
  /** Its first Monday, "2027-03-08". */
  start: string;
  weeks: SeasonWeek[];
  /** The Mondays that half a window earlier and later begin with. */
  earlier: string;
  later: string;
};

/**
 * Nine weeks from the Monday of the week in which `from` lies, or from the Monday before this week's when there is no
 * such day. Weeks carry their ISO 8601 number.
 */
export function seasonWindow(from: string | undefined, today: string, zone: string): SeasonWindow {
  const wanted = from === undefined ? null : readDay(from);
  const start = mondayOf(wanted ?? addDays(today, -7));
  return {
    start,
    weeks: Array.from({ length: WEEKS }, (_, index) => {
      const day = addDays(start, index * 7);
      // Local time here is only a carrier of the calendar day: both sides read it in the same zone.
      const [year = 0, month = 1, date = 1] = day.split("-").map(Number);
      return {
        number: getISOWeek(new Date(year, month - 1, date)),
        start: day,
        label: monthDay.format(new Date(`${day}T00:00:00Z`)),
      };
    }),
    from: localDateRange(start, zone).from,
    to: localDateRange(addDays(start, WEEKS * 7 - 1), zone).to,
    earlier: addDays(start, -28),
    later: addDays(start, 28),
  };
}

/** The day as it was written, if it is one within reach of a calendar. */
function readDay(text: string): string | null {
  if (!/^(19|20|21)\d\d-\d\d-\d\d$/.test(text)) return null;
  const at = Date.parse(`${text}T00:00:00Z`);
  return !Number.isNaN(at) && new Date(at).toISOString().startsWith(text) ? text : null;
}

function addDays(day: string, days: number): string {
  return new Date(Date.parse(`${day}T00:00:00Z`) + days * DAY_MS).toISOString().slice(0, 10);
}

function mondayOf(day: string): string {
  const weekday = new Date(`${day}T00:00:00Z`).getUTCDay();
  return addDays(day, -((weekday + 6) % 7));
}
