import type { SingerField } from "./types";

/** What a column can hold: a singer's field, or a part of a name or range that two columns share. */
export type ColumnMeaning = SingerField | "givenName" | "familyName" | "range";

interface Heading {
  meaning: ColumnMeaning;
  /** As the form we give out has it; null for headings that are only understood. */
  label: string | null;
  variants: readonly string[];
}

/** Headings as people write them, compared without case, accents, punctuation or spaces. */
export const SINGER_HEADINGS: readonly Heading[] = [
  {
    meaning: "name",
    label: "Name",
    variants: [
      "full name",
      "singer",
      "singer name",
      "actor",
      "performer",
      "name of singer",
      "name used",
    ],
  },
  {
    meaning: "email",
    label: "E-mail",
    variants: ["email", "email address", "e-mail address", "mail", "contact email", "your email"],
  },
  {
    meaning: "phone",
    label: "Phone",
    variants: [
      "phone number",
      "telephone",
      "tel",
      "mobile",
      "mobile number",
      "cell",
      "contact number",
    ],
  },
  { meaning: "pronouns", label: "Pronouns", variants: ["pronoun", "your pronouns"] },
  {
    meaning: "role",
    label: "Role",
    variants: [
      "roles",
      "part",
      "role of interest",
      "role interest",
      "auditioning for",
      "sings for",
    ],
  },
  {
    meaning: "song",
    label: "Song",
    variants: ["song title", "audition song", "title of song", "cut", "piece", "music"],
  },
  {
    meaning: "bars",
    label: "Bars",
    variants: ["bars of song", "length in bars", "measures", "cut length"],
  },
  {
    meaning: "low",
    label: "Lowest note",
    variants: [
      "low",
      "lowest",
      "low note",
      "lowest pitch",
      "bottom note",
      "range low",
      "range from",
    ],
  },
  {
    meaning: "high",
    label: "Highest note",
    variants: [
      "high",
      "highest",
      "high note",
      "highest pitch",
      "top note",
      "range high",
      "range to",
    ],
  },
  {
    meaning: "minor",
    label: "Under 18",
    variants: ["minor", "under 18?", "is minor", "under eighteen"],
  },
  {
    meaning: "notBefore",
    label: "Not before",
    variants: ["earliest", "earliest time", "from time", "available from", "after"],
  },
  {
    meaning: "notAfter",
    label: "Not after",
    variants: [
      "latest",
      "latest time",
      "to time",
      "available until",
      "available to",
      "until",
      "before",
    ],
  },
  {
    meaning: "givenName",
    label: null,
    variants: ["first name", "given name", "forename", "firstname", "first"],
  },
  {
    meaning: "familyName",
    label: null,
    variants: ["last name", "family name", "surname", "lastname", "last"],
  },
  {
    meaning: "range",
    label: null,
    variants: ["vocal range", "voice range", "singing range", "range"],
  },
];

/** The example row of the form we give out; reading it back is recognised by its address. */
export const EXAMPLE_SINGER: Readonly<Partial<Record<ColumnMeaning, string | number>>> = {
  name: "Ottoline Marsh",
  email: "ottoline@form.example",
  phone: "0000 555 011",
  pronouns: "she/her",
  role: "Any",
  song: "The Lost Chord",
  bars: 32,
  low: "A3",
  high: "E5",
  minor: "no",
  notBefore: "10:30",
  notAfter: "16:00",
};

const MEANINGS = new Map(
  SINGER_HEADINGS.flatMap(({ meaning, label, variants }) =>
    [...(label === null ? [] : [label]), ...variants].map(
      (text) => [plain(text), meaning] as const,
    ),
  ),
);

/** What a column with this heading holds, or null when the heading means nothing here. */
export function meaningOfHeading(text: string): ColumnMeaning | null {
  return MEANINGS.get(plain(text)) ?? null;
}

function plain(text: string): string {
  return text
    .normalize("NFKD")
    .toLowerCase()
    .replaceAll(/[^\p{Letter}\p{Number}]/gu, "");
}
