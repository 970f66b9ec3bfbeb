import { z } from "zod";
import { idField, localDateField, localTimeField, optionalLocalDate, optionalText } from "./common";

const optionalTime = z
  .union([z.literal(""), localTimeField])
  .nullish()
  .transform((time) => (time === undefined || time === null || time === "" ? null : time));

/** A range longer than this is more likely a slip than an absence. */
const LONGEST_DAYS = 366;

export const addConflictSchema = z
  .object({
    /** The company records it is written for: one form may tell several companies. */
    personIds: z.array(idField).min(1, "Choose which company to tell."),
    span: z.enum(["day", "days", "part"], "Choose one day, several days, or part of a day."),
    from: localDateField,
    to: optionalLocalDate,
    timeFrom: optionalTime,
    timeTo: optionalTime,
    reason: optionalText(160),
  })
  .superRefine((c, ctx) => {
    if (c.span === "days") {
      if (c.to === null)
        ctx.addIssue({ code: "custom", path: ["to"], message: "Choose the last day." });
      else if (c.to < c.from)
        ctx.addIssue({
          code: "custom",
          path: ["to"],
          message: "The last day cannot come before the first.",
        });
      else if (Date.parse(c.to) - Date.parse(c.from) > LONGEST_DAYS * 86_400_000) {
        ctx.addIssue({
          code: "custom",
          path: ["to"],
          message: "That is more than a year. Check the dates, or speak to the company.",
        });
      }
    }
    if (c.span === "part") {
      if (c.timeFrom === null)
        ctx.addIssue({ code: "custom", path: ["timeFrom"], message: "Write when it begins." });
      if (c.timeTo === null)
        ctx.addIssue({ code: "custom", path: ["timeTo"], message: "Write when it ends." });
      if (c.timeFrom !== null && c.timeTo !== null && c.timeTo <= c.timeFrom) {
        ctx.addIssue({
          code: "custom",
          path: ["timeTo"],
          message: "The end has to come after the beginning.",
        });
      }
    }
  })
  // Only what the choice asks for counts: a field that was filled in before and is hidden now does not.
  .transform((c) => ({
    personIds: [...new Set(c.personIds)],
    from: c.from,
    to: c.span === "days" ? (c.to ?? c.from) : c.from,
    timeFrom: c.span === "part" ? c.timeFrom : null,
    timeTo: c.span === "part" ? c.timeTo : null,
    reason: c.reason,
  }));

export const conflictIdsSchema = z.object({ conflictIds: z.array(idField).min(1).max(50) });
