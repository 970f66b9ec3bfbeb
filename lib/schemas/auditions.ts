import { z } from "zod";
import { parsePitch } from "@/lib/music/parse-pitch";
import {
  emailField,
  idField,
  localDateField,
  localTimeField,
  optionalText,
  requiredText,
} from "./common";

const minutes = (least: number, most: number) =>
  z.coerce
    .number({ error: "Write a number of minutes." })
    .int("Write whole minutes.")
    .min(least, `At least ${String(least)} minutes.`)
    .max(most, `At most ${String(most)} minutes.`);

const optionalTime = z
  .union([z.literal(""), localTimeField])
  .nullish()
  .transform((time) => (time === undefined || time === null || time === "" ? null : time));

const dayShape = {
  productionId: idField,
  localDate: localDateField,
  slotMinutes: minutes(1, 120),
  restAfterMinutes: minutes(1, 600),
  restMinutes: minutes(0, 120),
  lunchMinutes: minutes(0, 180),
  lunchFrom: optionalTime,
  lunchTo: optionalTime,
  hold: z.boolean().default(false),
  rooms: z
    .array(z.object({ roomId: idField, opens: localTimeField, closes: localTimeField }))
    .min(1, "Choose at least one room.")
    .max(20, "Choose at most 20 rooms."),
};

type DayInput = z.output<z.ZodObject<typeof dayShape>>;

const LUNCH = {
  path: ["lunchFrom"],
  message: "Write between which times lunch may lie, or set lunch to 0 minutes.",
};
const lunchHasTimes = (d: Pick<DayInput, "lunchMinutes" | "lunchFrom" | "lunchTo">): boolean =>
  d.lunchMinutes === 0 || (d.lunchFrom !== null && d.lunchTo !== null);
const ONCE = { path: ["rooms"], message: "The same room is there twice. Keep it once." };
const roomsOnce = (d: Pick<DayInput, "rooms">): boolean =>
  new Set(d.rooms.map((r) => r.roomId)).size === d.rooms.length;

export const createDaySchema = z
  .object(dayShape)
  .refine(lunchHasTimes, LUNCH)
  .refine(roomsOnce, ONCE);

export const changeDaySchema = z
  .object({
    ...dayShape,
    dayId: idField,
    version: z.coerce.number().int(),
    /** Who may lose their slot: the sign-ups the person was shown and agreed to. */
    mayLose: z.array(idField).max(2000).default([]),
  })
  .refine(lunchHasTimes, LUNCH)
  .refine(roomsOnce, ONCE);

export const daySchema = z.object({ productionId: idField, dayId: idField });

/** A note as MIDI number, or as people write it ("Bb3"); empty is null. */
const optionalPitch = z
  .union([z.number().int(), z.string().trim()])
  .nullish()
  .transform((given, context) => {
    if (given === undefined || given === null || given === "") return null;
    const midi = typeof given === "number" ? given : parsePitch(given.replaceAll(" ", ""))?.midi;
    if (midi === undefined) {
      context.addIssue({
        code: "custom",
        message: "Write letter and octave, like A3, Bb3 or F#5 (C4 is middle C).",
      });
      return z.NEVER;
    }
    if (midi < 24 || midi > 100) {
      context.addIssue({
        code: "custom",
        message: "Nobody sings that note: check the octave (C4 is middle C).",
      });
      return z.NEVER;
    }
    return midi;
  });

const optionalBars = z
  .union([
    z.literal(""),
    z.coerce
      .number({ error: "Write a number of bars." })
      .int("Write whole bars.")
      .min(1, "At least one bar.")
      .max(9999, "At most 9999 bars."),
  ])
  .nullish()
  .transform((bars) => (bars === undefined || bars === null || bars === "" ? null : bars));

const singerShape = {
  name: requiredText("a name", 160),
  email: emailField,
  phone: optionalText(40),
  pronouns: optionalText(40),
  minor: z
    .boolean()
    .nullish()
    .transform((minor) => minor ?? false),
  asksFor: optionalText(200),
  song: optionalText(200),
  bars: optionalBars,
  low: optionalPitch,
  high: optionalPitch,
  notBefore: optionalTime,
  notAfter: optionalTime,
};

type SingerInput = {
  low: number | null;
  high: number | null;
  notBefore: string | null;
  notAfter: string | null;
};

const notesInOrder = (s: SingerInput): boolean =>
  s.low === null || s.high === null || s.low < s.high;
const NOTES = { path: ["low"], message: "The lowest note has to lie below the highest." };
const timesInOrder = (s: Pick<SingerInput, "notBefore" | "notAfter">): boolean =>
  s.notBefore === null || s.notAfter === null || s.notBefore < s.notAfter;
const TIMES = {
  path: ["notBefore"],
  message: "Nothing lies between these times. Change one of them.",
};

/** One singer of a list, as the import previews and saves it. */
export const singerRowSchema = z
  .object(singerShape)
  .refine(notesInOrder, NOTES)
  .refine(timesInOrder, TIMES);

export type SingerRowInput = z.input<typeof singerRowSchema>;
export type SingerRowValues = z.output<typeof singerRowSchema>;

export const addSingerSchema = z
  .object({ productionId: idField, ...singerShape })
  .refine(notesInOrder, NOTES)
  .refine(timesInOrder, TIMES);

export const importSingersSchema = z.object({
  productionId: idField,
  rows: z
    .array(singerRowSchema)
    .min(1, "Choose at least one row.")
    .max(2000, "Import at most 2,000 rows at once."),
});

export const signUpSchema = z.object({ productionId: idField, signUpId: idField });

export const changeSignUpSchema = z
  .object({
    productionId: idField,
    signUpId: idField,
    version: z.coerce.number().int(),
    song: singerShape.song,
    bars: optionalBars,
    asksFor: singerShape.asksFor,
    notBefore: optionalTime,
    notAfter: optionalTime,
  })
  .refine(timesInOrder, TIMES);

export const placeSingerSchema = z.object({
  productionId: idField,
  signUpId: idField,
  slotId: idField,
  /** Where the person saw the singer (null: waiting), so that nobody is moved twice at once. */
  seenIn: idField.nullable(),
});

export const swapSingersSchema = z.object({
  productionId: idField,
  first: z.object({ signUpId: idField, slotId: idField }),
  second: z.object({ signUpId: idField, slotId: idField }),
});

export const acceptFillSchema = z.object({
  productionId: idField,
  dayId: idField,
  placements: z
    .array(z.object({ signUpId: idField, slotId: idField }))
    .min(1)
    .max(2000),
});

export const assignPianistSchema = z
  .object({
    productionId: idField,
    auditionRoomId: idField,
    personId: idField,
    from: localTimeField,
    to: localTimeField,
  })
  .refine((a) => a.from < a.to, {
    path: ["to"],
    error: "The end has to come after the beginning.",
  });

export const removePianistSchema = z.object({ productionId: idField, sessionId: idField });

export const inviteSingersSchema = z.object({
  productionId: idField,
  dayId: idField,
  /** Null: everyone placed on the day who has not been invited. */
  signUpIds: z.array(idField).min(1, "Choose at least one singer.").max(2000).nullable(),
});

export const DOOR_ACTS = ["here", "not-here", "in", "out"] as const;

export type DoorAct = (typeof DOOR_ACTS)[number];

export const doorActSchema = z.object({
  token: z.string().min(1).max(200),
  signUpId: idField,
  act: z.enum(DOOR_ACTS),
});
