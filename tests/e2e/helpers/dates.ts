import { statSync } from "node:fs";
import { setting } from "./demo-season";

const ZONE = "Europe/London";

/** A date of the demo season, "2027-03-20": so many days after the day it was loaded, on the companies' clock. */
export function dayOfDemo(days: number): string {
  const loaded = new Intl.DateTimeFormat("en-CA", { timeZone: ZONE }).format(
    statSync(setting("E2E_PEOPLE_FILE")).mtime,
  );
  const date = new Date(`${loaded}T12:00:00Z`);
  date.setUTCDate(date.getUTCDate() + days);
  return date.toISOString().slice(0, 10);
}

/** Whether a date is a Saturday. */
export const isSaturday = (date: string): boolean =>
  new Date(`${date}T12:00:00Z`).getUTCDay() === 6;

/** A date as people say it: "Saturday 20 March". */
export function spoken(date: string): string {
  const at = new Date(`${date}T12:00:00Z`);
  const part = (options: Intl.DateTimeFormatOptions): string =>
    new Intl.DateTimeFormat("en-GB", { ...options, timeZone: "UTC" }).format(at);
  return `${part({ weekday: "long" })} ${String(at.getUTCDate())} ${part({ month: "long" })}`;
}
