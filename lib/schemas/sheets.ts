import { z } from "zod";
import { idField, localDateField } from "./common";

export const issueSheetSchema = z.object({
  productionId: idField,
  localDate: localDateField,
  /** What the person saw before sending: a sheet that changed meanwhile is not sent. */
  seen: z.string().regex(/^[0-9a-f]{64}$/, "Load the page again."),
  /** One note a line. */
  notes: z
    .string()
    .max(1200, "Keep the notes to 1,200 characters.")
    .nullish()
    .transform((text) =>
      (text ?? "")
        .split("\n")
        .map((line) => line.trim())
        .filter((line) => line !== ""),
    )
    .pipe(z.array(z.string()).max(8, "Keep the notes to 8 lines.")),
});

export const acknowledgeSheetSchema = z.object({ issueId: idField });

/** Where an issue is found in an address, and as what file it is asked for. */
export const issueAddressSchema = z.object({ productionId: idField, issueId: idField });

export const sheetFileSchema = z.object({
  format: z.enum(["xlsx", "csv"]).default("xlsx"),
  paper: z.enum(["A4", "Letter"]).optional(),
});
