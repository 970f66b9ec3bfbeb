"use server";

import { revalidatePath } from "next/cache";
import { defineAction } from "@/lib/auth/define-action";
import * as peopleData from "@/lib/data/people";
import * as roomData from "@/lib/data/rooms";
import { endPositionSchema, invitePersonSchema } from "@/lib/schemas/people";
import {
  addRoomSchema,
  addVenueSchema,
  changeRoomSchema,
  changeVenueSchema,
  setTravelSchema,
} from "@/lib/schemas/rooms";

const PEOPLE = "/companies/[companyId]/people";
const ROOMS = "/companies/[companyId]/rooms";

/** The same as inviting into a production, for a position in the company itself (`productionId` null). */
export const inviteMember = defineAction({ input: invitePersonSchema }, async (input, actor) => {
  const personId = await peopleData.invitePerson(actor, input);
  revalidatePath(PEOPLE, "page");
  return { personId };
});

export const endMembership = defineAction({ input: endPositionSchema }, async (input, actor) => {
  await peopleData.endPosition(actor, input);
  revalidatePath(PEOPLE, "page");
});

export const reopenMembership = defineAction({ input: endPositionSchema }, async (input, actor) => {
  await peopleData.reopenPosition(actor, input);
  revalidatePath(PEOPLE, "page");
});

export const addVenue = defineAction({ input: addVenueSchema }, async (input, actor) => {
  const venueId = await roomData.addVenue(actor, input);
  revalidatePath(ROOMS, "page");
  return { venueId };
});

export const changeVenue = defineAction({ input: changeVenueSchema }, async (input, actor) => {
  await roomData.changeVenue(actor, input);
  revalidatePath(ROOMS, "page");
});

export const addRoom = defineAction({ input: addRoomSchema }, async (input, actor) => {
  const roomId = await roomData.addRoom(actor, input);
  revalidatePath(ROOMS, "page");
  return { roomId };
});

export const changeRoom = defineAction({ input: changeRoomSchema }, async (input, actor) => {
  await roomData.changeRoom(actor, input);
  revalidatePath(ROOMS, "page");
});

export const setTravel = defineAction({ input: setTravelSchema }, async (input, actor) => {
  await roomData.setTravel(actor, input);
  revalidatePath(ROOMS, "page");
});
