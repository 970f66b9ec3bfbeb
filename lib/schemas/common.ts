import { z } from "zod";

/** Text from a form: outer spaces off; empty is refused with words that say what belongs there. */
export const requiredText = (what: string, max: number) =>
  z
    .string({ error: `Write ${what}.` })
    .trim()
    .min(1, `Write ${what}.`)
    .max(max, `Keep this to ${String(max)} characters.`);

/** Text that may be left empty: an empty field is null. */
export const optionalText = (max: number) =>
  z
    .string()
    .trim()
    .max(max, `Keep this to ${String(max)} characters.`)
    .nullish()
    .transform((text) => (text === undefined || text === null || text === "" ? null : text));

export const emailField = z
  .string({ error: "Write an e-mail address." })
  .trim()
  .toLowerCase()
  .max(254, "That address is too long.")
  .pipe(z.email("This does not look like an e-mail address, such as name@example.org."));

export const idField = z.uuid("That choice is no longer there: load the page again.").toLowerCase();

export const localDateField = z.iso.date("Choose a day.");

export const optionalLocalDate = z
  .union([z.literal(""), z.iso.date("Choose a day, or leave it empty.")])
  .nullish()
  .transform((day) => (day === undefined || day === null || day === "" ? null : day));

export const localTimeField = z
  .string()
  .regex(/^([01]\d|2[0-3]):[0-5]\d$/, "Write a time such as 18:30.");

/** An IANA zone that this server knows. */
export const zoneField = z.string().refine((zone) => {
  try {
    new Intl.DateTimeFormat("en", { timeZone: zone });
    return true;
  } catch {
    return false;
  }
}, "Choose a time zone from the list.");
