import { z } from "zod";
import { idField } from "./common";

const pitch = z.coerce
  .number()
  .int()
  .min(24, "That is below what anyone sings.")
  .max(100, "That is above what anyone sings.");
const comfortable = pitch.nullish().transform((p) => p ?? null);

const rangeShape = {
  low: pitch,
  high: pitch,
  comfortableLow: comfortable,
  comfortableHigh: comfortable,
};

type RangeInput = {
  low: number;
  high: number;
  comfortableLow: number | null;
  comfortableHigh: number | null;
};

const inOrder = (r: RangeInput): boolean => r.low < r.high;
const comfortInside = (r: RangeInput): boolean =>
  (r.comfortableLow ?? r.low) >= r.low &&
  (r.comfortableHigh ?? r.high) <= r.high &&
  (r.comfortableLow ?? r.low) <= (r.comfortableHigh ?? r.high);

const ORDER = { path: ["low"], message: "The lowest note has to lie below the highest." };
const COMFORT = {
  path: ["comfortableLow"],
  message: "What is comfortable has to lie inside the range.",
};

export const hearRangeSchema = z
  .object({ productionId: idField, personId: idField, ...rangeShape })
  .refine(inOrder, ORDER)
  .refine(comfortInside, COMFORT);

// A key of the drawn keyboard, or none yet.
const drawnKey = z
  .number()
  .int()
  .min(24, "That is below what anyone sings.")
  .max(100, "That is above what anyone sings.")
  .nullable();
const drawnRange = z.object({ low: drawnKey, high: drawnKey });

/** A singer's own range from two drawn keyboards: what they sing, and (if they say) where it is comfortable. */
export const claimRangeSchema = z
  .object({
    /** The company records it is written to: a person has one voice. */
    personIds: z.array(idField).min(1, "Choose which company to tell."),
    range: drawnRange,
    comfortable: drawnRange,
  })
  .transform(({ personIds, range, comfortable }, ctx) => {
    const { low, high } = range;
    if (low === null || high === null || low >= high) {
      ctx.addIssue({
        code: "custom",
        path: ["range"],
        message: "Choose your lowest note and your highest.",
      });
      return z.NEVER;
    }
    const { low: comfortableLow, high: comfortableHigh } = comfortable;
    if ((comfortableLow === null) !== (comfortableHigh === null)) {
      ctx.addIssue({
        code: "custom",
        path: ["comfortable"],
        message: "Choose both ends of the comfortable part, or leave it empty.",
      });
      return z.NEVER;
    }
    const ranges = { low, high, comfortableLow, comfortableHigh };
    if (!comfortInside(ranges)) {
      ctx.addIssue({
        code: "custom",
        path: ["comfortable"],
        message: "What is comfortable has to lie inside the range.",
      });
      return z.NEVER;
    }
    return { personIds: [...new Set(personIds)], ...ranges };
  });
