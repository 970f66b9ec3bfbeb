import { z } from "zod";
import { POSITION_KINDS } from "@/lib/permissions/position-kinds";
import { emailField, idField, optionalText, requiredText } from "./common";

/** The positions a company itself has; all others belong to a production. */
export const COMPANY_POSITIONS = ["company_admin", "music_director"] as const;

/** The positions of a production. */
export const PRODUCTION_POSITIONS = POSITION_KINDS.filter((kind) => kind !== "company_admin");

export const invitePersonSchema = z
  .object({
    companyId: idField,
    /** Null for a position in the company itself. */
    productionId: idField.nullable(),
    name: requiredText("a name", 160),
    email: emailField,
    phone: optionalText(40),
    kind: z.enum(POSITION_KINDS, "Choose a position."),
  })
  .refine(
    ({ kind, productionId }) =>
      productionId === null
        ? COMPANY_POSITIONS.some((known) => known === kind)
        : PRODUCTION_POSITIONS.some((known) => known === kind),
    { path: ["kind"], error: "Choose a position from the list." },
  );

export const endPositionSchema = z.object({ positionId: idField });
