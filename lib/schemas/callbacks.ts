import { z } from "zod";
import { idField, localTimeField, optionalText, requiredText } from "./common";

export const startRoundSchema = z.object({
  productionId: idField,
  title: requiredText("a name for the round, such as Callbacks", 120),
});

export const changeRoundSchema = z
  .object({
    productionId: idField,
    roundId: idField,
    version: z.coerce.number().int(),
    localDate: z.iso.date("Choose a day."),
    from: localTimeField,
    to: localTimeField,
    roomId: idField.or(z.literal("")).transform((id) => (id === "" ? null : id)),
    material: optionalText(2000),
  })
  .refine((r) => r.from < r.to, {
    path: ["to"],
    error: "The end has to come after the beginning.",
  });

export const markSchema = z.object({
  productionId: idField,
  roundId: idField,
  personId: idField,
  roleId: idField,
  on: z.boolean(),
});

export const publishRoundSchema = z.object({
  productionId: idField,
  roundId: idField,
  version: z.coerce.number().int(),
});

export const answerCallbackSchema = z.object({
  invitationId: idField,
  answer: z.enum(["yes", "no"]),
});
