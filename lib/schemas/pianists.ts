import { z } from "zod";
import { idField } from "./common";

export const assignCallPianistSchema = z.object({
  productionId: idField,
  callId: idField,
  version: z.coerce.number().int(),
  /** Empty: nobody plays. */
  personId: z
    .union([z.literal(""), idField])
    .nullish()
    .transform((id) => (id === undefined || id === null || id === "" ? null : id)),
});
