import { z } from "zod";
import { parsePitch } from "@/lib/music/parse-pitch";
import { EXAMPLE_SINGER, type ColumnMeaning } from "./singer-headings";
import type { RowProblem, SheetPitch, SingerField, SingerValues } from "./types";

const MAX_LENGTH = 200;
const EMAIL = z.email();
const YES = /^(yes|y|true|1|x|✓|✔|under ?18)$/i;
const NO = /^(no|n|false|0|-|adult|over ?18|18\+)$/i;
const CLOCK = /^(\d{1,2})(?:[:.h](\d{2}))?(?::00)? ?(am|pm|a\.m\.|p\.m\.)?$/i;

/**
 * One row's cells, by what their column holds, as a singer's values and what is wrong with them. A cell
 * that cannot be read leaves its value out and a problem in; every other value of the row is kept.
 */
export function readSingerRow(cells: ReadonlyMap<ColumnMeaning, string>): {
  values: SingerValues;
  problems: RowProblem[];
} {
  const problems: RowProblem[] = [];
  const report = (field: SingerField, message: string) => {
    problems.push({ field, message });
  };
  const text = (meaning: ColumnMeaning) => tidy(cells.get(meaning) ?? "");
  const read = <Value>(
    field: SingerField,
    parse: (given: string) => Value | null,
    advice: string,
    given = text(field),
  ): Value | null => {
    if (given === "") return null;
    const value = parse(given);
    if (value === null) report(field, `“${given.slice(0, 40)}” ${advice}`);
    return value;
  };

  const name = text("name") || tidy(`${text("givenName")} ${text("familyName")}`);
  if (name === "") report("name", "The name is missing. Write the name the singer uses.");

  const email = text("email");
  if (email === "")
    report("email", "The e-mail address is missing. Without it nobody can be invited.");
  else if (!EMAIL.safeParse(email).success) {
    report(
      "email",
      `“${email.slice(0, 60)}” is not an e-mail address. Write it like name@example.org.`,
    );
  } else if (email === EXAMPLE_SINGER.email) {
    report("email", "This is the example from the form. Delete the row.");
  }

  const range = splitRange(text("range"));
  const pitchAdvice =
    "is not a note. Write letter and octave, like A3, Bb3 or F#5 (C4 is middle C).";
  const low = read<SheetPitch>("low", readPitch, pitchAdvice, text("low") || range.low);
  const high = read<SheetPitch>("high", readPitch, pitchAdvice, text("high") || range.high);
  if (low && high && low.midi > high.midi) {
    report(
      "low",
      `The lowest note, ${low.spelling}, is above the highest, ${high.spelling}. Swap or correct them.`,
    );
  }

  const bars = read("bars", readBars, "is not a number of bars. Write one whole number, like 32.");
  const minor = read("minor", readYesOrNo, "is neither yes nor no. Write one of them.");
  const timeAdvice = "is not a time of day. Write it like 10:30.";
  const notBefore = read("notBefore", readClock, timeAdvice);
  const notAfter = read("notAfter", readClock, timeAdvice);
  if (notBefore !== null && notAfter !== null && notBefore >= notAfter) {
    report(
      "notBefore",
      `Nothing lies between ${notBefore} and ${notAfter}. Change one of the times.`,
    );
  }

  const values: SingerValues = { name, email };
  for (const field of ["phone", "pronouns", "role", "song"] as const) {
    const given = text(field);
    if (given !== "") values[field] = given;
  }
  for (const field of ["name", "email", "phone", "pronouns", "role", "song"] as const) {
    if ((values[field] ?? "").length > MAX_LENGTH) {
      report(field, `This is longer than ${String(MAX_LENGTH)} characters. Shorten it.`);
    }
  }
  if (bars !== null) values.bars = bars;
  if (low) values.low = low;
  if (high) values.high = high;
  if (minor !== null) values.minor = minor;
  if (notBefore !== null) values.notBefore = notBefore;
  if (notAfter !== null) values.notAfter = notAfter;
  return { values, problems };
}

/** One line of text: no control characters, no doubled spaces, accents in one piece. */
function tidy(text: string): string {
  return text
    .normalize("NFC")
    .replaceAll(/[\p{Control}\p{Zs}\u200b\ufeff]+/gu, " ")
    .trim();
}

/** "A3–E5", "A3 to E5": a range written in one cell. */
function splitRange(text: string): { low: string; high: string } {
  const [low = "", high = ""] = text.split(/\s*(?:–|—|-|\bto\b)\s*/i);
  return { low, high: text === "" ? "" : high || text };
}

function readPitch(given: string): SheetPitch | null {
  return parsePitch(given.replaceAll(" ", ""));
}

function readBars(given: string): number | null {
  const match = /^(\d{1,4})(?: ?(?:bars?|measures?))?$/i.exec(given);
  const bars = Number(match?.[1]);
  return bars > 0 ? bars : null;
}

function readYesOrNo(given: string): boolean | null {
  if (YES.test(given)) return true;
  return NO.test(given) ? false : null;
}

/** "10:30", "10.30", "2 pm" and "9" as `10:30`, `14:00`, `09:00`. */
function readClock(given: string): string | null {
  const match = CLOCK.exec(given);
  if (!match) return null;
  const [, hours = "", minutes = "00", half = ""] = match;
  let hour = Number(hours);
  if (half !== "") {
    if (hour < 1 || hour > 12) return null;
    hour = (hour % 12) + (half.toLowerCase().startsWith("p") ? 12 : 0);
  }
  if (hour > 23 || Number(minutes) > 59) return null;
  return `${String(hour).padStart(2, "0")}:${minutes}`;
}
