import { z } from "zod";
import { idField } from "./common";

export const chooseSchema = z.object({
  productionId: idField,
  roleId: idField,
  personId: idField,
  /** "none" takes the choice back. */
  state: z.enum(["none", "considered", "cast"]),
  kind: z.enum(["principal", "alternate", "cover", "swing"]).default("principal"),
  /** The version on the screen, 0 where there was no choice: a change on stale ground is refused. */
  version: z.coerce.number().int().min(0),
});

export const fitSchema = z.object({ productionId: idField, roleId: idField, personId: idField });

export const publishCastSchema = z.object({ productionId: idField, published: z.boolean() });
