import { z } from "zod";
import { idField, requiredText } from "./common";

const addressField = z.string().trim().max(255, "Keep this to 255 characters.").default("");
const nameField = (what: string, max: number) => requiredText(what, max);

export const addVenueSchema = z.object({
  companyId: idField,
  name: nameField("the venue's name", 160),
  address: addressField,
});

export const changeVenueSchema = addVenueSchema.extend({ venueId: idField });

export const addRoomSchema = z.object({
  companyId: idField,
  venueId: idField,
  name: nameField("the room's name", 120),
  hasPiano: z.boolean(),
});

export const changeRoomSchema = z.object({
  companyId: idField,
  roomId: idField,
  name: nameField("the room's name", 120),
  hasPiano: z.boolean(),
});

/** Whole minutes up to a day; empty means that nobody has said yet. */
const travelMinutes = z
  .string()
  .trim()
  .regex(/^\d{0,4}$/, "Write whole minutes, such as 35.")
  .transform((text) => (text === "" ? null : Number(text)))
  .refine((minutes) => minutes === null || minutes <= 1440, "That is more than a day.");

export const setTravelSchema = z.object({
  companyId: idField,
  pairs: z
    .array(z.object({ a: idField, b: idField, minutes: travelMinutes }))
    .max(2000, "That is more than one page can hold."),
});
