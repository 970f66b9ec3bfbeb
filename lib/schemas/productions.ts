import { z } from "zod";
import { idField, optionalLocalDate, requiredText, zoneField } from "./common";

export const createCompanySchema = z.object({
  name: requiredText("the company's name", 160),
  zone: zoneField,
  paper: z.enum(["A4", "Letter"], "Choose a paper size."),
});

export const createProductionSchema = z
  .object({
    companyId: idField,
    title: requiredText("the production's title", 160),
    opensOn: optionalLocalDate,
    closesOn: optionalLocalDate,
  })
  .refine((p) => p.opensOn === null || p.closesOn === null || p.opensOn <= p.closesOn, {
    path: ["closesOn"],
    error: "The last night cannot come before the first.",
  });

export const changeProductionSchema = z
  .object({
    productionId: idField,
    version: z.coerce.number().int(),
    title: requiredText("the production's title", 160),
    stage: z.enum(["planning", "auditions", "casting", "rehearsals", "running", "closed"]),
    opensOn: optionalLocalDate,
    closesOn: optionalLocalDate,
  })
  .refine((p) => p.opensOn === null || p.closesOn === null || p.opensOn <= p.closesOn, {
    path: ["closesOn"],
    error: "The last night cannot come before the first.",
  });
