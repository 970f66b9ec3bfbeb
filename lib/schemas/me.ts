import { z } from "zod";
import { idField } from "./common";

/** A singer's answer to the audition time they saw. */
export const answerSlotSchema = z.object({
  signUpId: idField,
  slotId: idField,
  answer: z.enum(["confirm", "decline"]),
});
