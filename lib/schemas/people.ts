import { z } from "zod";
import { POSITION_KINDS } from "@/lib/permissions/position-kinds";
import { emailField, idField, optionalText, requiredText } from "./common";

export const invitePersonSchema = z.object({
  companyId: idField,
  /** Null for a position in the company itself. */
  productionId: idField.nullable(),
  name: requiredText("a name", 160),
  email: emailField,
  phone: optionalText(40),
  kind: z.enum(POSITION_KINDS, "Choose a position."),
});

export const endPositionSchema = z.object({ positionId: idField });
