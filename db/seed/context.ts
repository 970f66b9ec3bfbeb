import { addDays } from "date-fns";
import type { Tx } from "@/db/client";
import { newId } from "@/db/columns";
import { people, positions, users } from "@/db/schema";
import { localDay } from "@/lib/format-dates";
import type { PositionKind } from "@/lib/permissions/types";
import { toInstant } from "@/lib/schedule/to-instant";

export const ZONE = "Europe/London";

/** A date `days` after today in the demo's zone, as "2027-03-20". */
export function dayFromToday(days: number): string {
  return localDay(addDays(new Date(), days), ZONE);
}

/** The next date from today (today included) that falls on the weekday (1 Monday … 7 Sunday), `weeks` weeks on. */
export function weekday(day: number, weeks = 0): string {
  const today = new Date(`${dayFromToday(0)}T12:00:00Z`);
  const ahead = (day - (today.getUTCDay() === 0 ? 7 : today.getUTCDay()) + 7) % 7;
  return dayFromToday(ahead + weeks * 7);
}

/** The instant of a local date and time in the demo's zone. */
export function at(localDate: string, localTime: string): Date {
  return toInstant(localDate, localTime, ZONE).instant;
}

export type SeedPerson = { userId: string | null; name: string; email: string };

/** Writes a login. Returns it for `joinCompany`. */
export async function addUser(tx: Tx, name: string, email: string): Promise<SeedPerson> {
  const userId = newId();
  await tx.insert(users).values({ id: userId, name, email, emailVerified: new Date() });
  return { userId, name, email };
}

/** A company's record of a person. Returns its id. */
export async function joinCompany(
  tx: Tx,
  companyId: string,
  person: SeedPerson,
  extra: { phone?: string; pronouns?: string; minor?: boolean } = {},
): Promise<string> {
  const id = newId();
  await tx.insert(people).values({
    id,
    companyId,
    userId: person.userId,
    name: person.name,
    email: person.email,
    ...extra,
  });
  return id;
}

/** Opens a position. */
export async function give(
  tx: Tx,
  companyId: string,
  personId: string,
  kind: PositionKind,
  productionId: string | null,
): Promise<void> {
  await tx.insert(positions).values({ companyId, personId, kind, productionId });
}
