import { z } from "zod";
import { parsePitch } from "@/lib/music/parse-pitch";
import { parseKey } from "@/lib/score/keys";
import { parseLength } from "@/lib/score/number-length";
import { idField, optionalText, requiredText } from "./common";

/** An empty field is null; anything else has to be read by `read`. */
const optionalParsed = <T>(read: (text: string) => T | null, message: string) =>
  z
    .string()
    .trim()
    .nullish()
    .transform((text, context): T | null => {
      if (text === null || text === undefined || text === "") return null;
      const value = read(text);
      if (value === null) context.addIssue({ code: "custom", message });
      return value;
    });

const wholeNumber =
  (low: number, high: number) =>
  (text: string): number | null => {
    const value = Number(text);
    return Number.isInteger(value) && value >= low && value <= high ? value : null;
  };

const METRE = /^(\d{1,2}(\+\d{1,2})*\/(1|2|4|8|16|32)|free)$/;

const numberShape = {
  label: requiredText("the number, such as 4a", 12),
  title: requiredText("the title", 200),
  key: optionalParsed(parseKey, "Write a key such as E♭ or Eb; small letters are minor: c♯."),
  /** Fifths of the signature, kept when the key's name is left open. */
  keyFifths: optionalParsed(wholeNumber(-7, 7), "A key signature has at most seven signs."),
  metre: optionalParsed(
    (text) => (METRE.test(text.toLowerCase()) ? text.toLowerCase() : null),
    "Write a metre such as 3/4 or 6/8, or free.",
  ),
  tempo: optionalParsed(
    wholeNumber(20, 400),
    "Write the crotchets a minute as a whole number from 20 to 400.",
  ),
  bars: optionalParsed(wholeNumber(1, 9999), "Write how many bars, as a whole number."),
  length: optionalParsed(parseLength, "Write minutes and seconds, such as 3:20."),
};

export const addNumberSchema = z.object({ productionId: idField, ...numberShape });

export const changeNumberSchema = z.object({
  productionId: idField,
  numberId: idField,
  version: z.coerce.number().int(),
  ...numberShape,
});

export type NumberFields = Omit<z.output<typeof addNumberSchema>, "productionId">;

export const numberIdSchema = z.object({ productionId: idField, numberId: idField });

export const moveNumberSchema = z.object({
  productionId: idField,
  numberId: idField,
  direction: z.enum(["up", "down"]),
});

const people = (low: number, high: number, message: string) =>
  z.coerce.number(message).int(message).min(low, message).max(high, message);

const roleKind = z.enum(
  ["principal", "supporting", "ensemble"],
  "Choose what kind of role this is.",
);

const roleShape = {
  name: requiredText("the role's name", 120),
  kind: roleKind,
  needed: people(1, 400, "Write how many people this role needs, from 1 to 400."),
  covers: people(0, 20, "Write how many covers, from 0 to 20."),
  about: optionalText(2000),
};

export const addRoleSchema = z.object({ productionId: idField, ...roleShape });

export const changeRoleSchema = z.object({
  productionId: idField,
  roleId: idField,
  version: z.coerce.number().int(),
  ...roleShape,
});

export const roleIdSchema = z.object({ productionId: idField, roleId: idField });

/** The lowest and highest note a line may be typed with: C1 to E7 holds every voice. */
const LOWEST = 24;
const HIGHEST = 100;

const pitchField = (which: string) =>
  z
    .string({ error: `Write the ${which} note, such as B♭3.` })
    .trim()
    .min(1, `Write the ${which} note, such as B♭3.`)
    .transform((text, context) => {
      const pitch = parsePitch(text);
      if (!pitch)
        context.addIssue({
          code: "custom",
          message: "Write a note with its octave, such as B♭3, Bb3 or F#5. Middle C is C4.",
        });
      else if (pitch.midi < LOWEST || pitch.midi > HIGHEST)
        context.addIssue({ code: "custom", message: "No voice sings that. Middle C is C4." });
      return pitch ?? { midi: 0, spelling: "" };
    });

export const writeLineSchema = z
  .object({
    productionId: idField,
    roleId: idField,
    numberId: idField,
    low: pitchField("lowest"),
    high: pitchField("highest"),
    /** Set when lines read from a score are to give way to this one. */
    replaceRead: z.boolean().default(false),
  })
  .refine((line) => line.low.midi <= line.high.midi, {
    path: ["low"],
    error: "The lowest note has to lie below the highest.",
  });

export const lineIdSchema = z.object({ productionId: idField, lineId: idField });

const octaveShift = z.coerce
  .number()
  .int()
  .min(-2, "Two octaves down at most.")
  .max(2, "Two octaves up at most.");

export const shiftPartSchema = z.object({
  productionId: idField,
  scorePartId: idField,
  octaveShift,
});

const partPlan = z
  .object({
    scorePartId: idField,
    to: z.union([z.literal("leave"), z.literal("new"), idField], "Choose what this part becomes."),
    name: z.string().trim().max(120, "Keep this to 120 characters.").default(""),
    kind: roleKind.default("principal"),
    octaveShift,
  })
  .refine((part) => part.to !== "new" || part.name !== "", {
    path: ["name"],
    error: "Write the new role's name.",
  });

export const confirmReadingSchema = z.object({
  productionId: idField,
  scoreId: idField,
  /** The number that this file is a newer reading of; null makes a new one. */
  numberId: z
    .union([z.literal(""), idField])
    .nullish()
    .transform((id) => (id === undefined || id === null || id === "" ? null : id)),
  version: z.coerce.number().int().nullish(),
  ...numberShape,
  parts: z.array(partPlan).min(1).max(200),
});
