import { z } from "zod";

/** The public API's forms: the same schemas validate requests and make the OpenAPI description. */

const pitch = z.number().int().min(0).max(127).describe("MIDI number; 60 is C4");
const histogram = z
  .record(z.string().regex(/^\d{1,3}$/), z.number().nonnegative())
  .describe("Sung quarter notes by MIDI pitch");

const singer = z
  .object({
    low: pitch,
    high: pitch,
    comfortableLow: pitch.optional(),
    comfortableHigh: pitch.optional(),
  })
  .refine((s) => s.low <= s.high, {
    path: ["low"],
    error: "The lowest note lies above the highest.",
  });

const line = z
  .object({
    low: pitch,
    high: pitch,
    histogram: histogram.optional(),
    optionalHigh: pitch.optional(),
    optionalLow: pitch.optional(),
  })
  .refine((l) => l.low <= l.high, {
    path: ["low"],
    error: "The lowest note lies above the highest.",
  });

export const rangeFitRequest = z.object({ singer, line });

export const rangeFitResponse = z.object({
  verdict: z.enum(["fits", "stretch", "out"]),
  shortBelow: z.number().int(),
  shortAbove: z.number().int(),
  shareOutside: z
    .number()
    .nullable()
    .describe("Part of the sung time outside the range; null when no histogram says"),
  shareOutsideComfort: z.number().nullable(),
  lowerReserve: z.number().int(),
  upperReserve: z.number().int(),
  tessituraShift: z.number(),
});

const namedPitch = z.object({ midi: z.number(), name: z.string() }).nullable();
const figures = z
  .object({
    quarters: z.number(),
    attacks: z.number().int(),
    histogram,
    p10: z.number().nullable(),
    p25: z.number().nullable(),
    p50: z.number().nullable(),
    p75: z.number().nullable(),
    p90: z.number().nullable(),
  })
  .nullable();
const warning = z.object({ code: z.string(), message: z.string() });

export const vocalLinesResponse = z.object({
  title: z.string().nullable(),
  measures: z.object({ written: z.number().int(), performed: z.number().int().nullable() }),
  keys: z.array(z.object({ measure: z.string(), fifths: z.number().int() })),
  parts: z.array(
    z.object({
      id: z.string(),
      name: z.string(),
      low: namedPitch,
      high: namedPitch,
      lowWithOptional: namedPitch,
      highWithOptional: namedPitch,
      written: figures,
      performed: figures,
      warnings: z.array(warning),
    }),
  ),
  warnings: z.array(warning),
});

export const apiError = z.object({
  error: z.object({
    code: z.string().describe("area.reason"),
    message: z.string(),
    path: z.string().optional(),
  }),
});
