import { z } from "zod";
import { idField } from "./common";

const pitch = z.coerce.number().int().min(24, "That is below what anyone sings.").max(100, "That is above what anyone sings.");
const comfortable = pitch.nullish().transform((p) => p ?? null);

const rangeShape = { low: pitch, high: pitch, comfortableLow: comfortable, comfortableHigh: comfortable };

type RangeInput = { low: number; high: number; comfortableLow: number | null; comfortableHigh: number | null };

const inOrder = (r: RangeInput): boolean => r.low < r.high;
const comfortInside = (r: RangeInput): boolean =>
  (r.comfortableLow ?? r.low) >= r.low && (r.comfortableHigh ?? r.high) <= r.high && (r.comfortableLow ?? r.low) <= (r.comfortableHigh ?? r.high);

const ORDER = { path: ["low"], message: "The lowest note has to lie below the highest." };
const COMFORT = { path: ["comfortableLow"], message: "What is comfortable has to lie inside the range." };

export const claimRangeSchema = z.object({ personId: idField, ...rangeShape }).refine(inOrder, ORDER).refine(comfortInside, COMFORT);

export const hearRangeSchema = z
  .object({ productionId: idField, personId: idField, ...rangeShape })
  .refine(inOrder, ORDER)
  .refine(comfortInside, COMFORT);
