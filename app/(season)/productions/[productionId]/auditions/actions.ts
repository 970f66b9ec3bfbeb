"use server";

import { revalidatePath } from "next/cache";
import { defineAction } from "@/lib/auth/define-action";
import * as changeDayData from "@/lib/data/auditions/change-day";
import * as dayData from "@/lib/data/auditions/days";
import * as doorLinkData from "@/lib/data/auditions/door-links";
import * as fillData from "@/lib/data/auditions/fill";
import * as importData from "@/lib/data/auditions/import-singers";
import * as inviteData from "@/lib/data/auditions/invite";
import * as pianistData from "@/lib/data/auditions/pianists";
import * as placeData from "@/lib/data/auditions/place";
import * as signUpData from "@/lib/data/auditions/sign-ups";
import * as rangeData from "@/lib/data/ranges";
import {
  acceptFillSchema,
  addSingerSchema,
  assignPianistSchema,
  changeDaySchema,
  changeSignUpSchema,
  createDaySchema,
  daySchema,
  importSingersSchema,
  inviteSingersSchema,
  placeSingerSchema,
  removePianistSchema,
  signUpSchema,
  swapSingersSchema,
} from "@/lib/schemas/auditions";
import { hearRangeSchema } from "@/lib/schemas/ranges";

function changed(productionId: string): void {
  revalidatePath(`/productions/${productionId}/auditions`, "layout");
}

export const createDay = defineAction({ input: createDaySchema }, async (input, actor) => {
  const dayId = await dayData.createDay(actor, input);
  changed(input.productionId);
  return { dayId };
});

export const changeDay = defineAction({ input: changeDaySchema }, async (input, actor) => {
  const result = await changeDayData.changeDay(actor, input);
  if (result.saved) changed(input.productionId);
  return result;
});

export const removeDay = defineAction({ input: daySchema }, async (input, actor) => {
  await dayData.removeDay(actor, input);
  changed(input.productionId);
});

export const addSinger = defineAction({ input: addSingerSchema }, async (input, actor) => {
  const signUpId = await signUpData.addSinger(actor, input);
  changed(input.productionId);
  return { signUpId };
});

export const importSingers = defineAction({ input: importSingersSchema }, async (input, actor) => {
  const done = await importData.importSingers(actor, input);
  changed(input.productionId);
  return done;
});

export const changeSignUp = defineAction({ input: changeSignUpSchema }, async (input, actor) => {
  await signUpData.changeSignUp(actor, input);
  changed(input.productionId);
});

export const withdrawSignUp = defineAction({ input: signUpSchema }, async (input, actor) => {
  await signUpData.withdrawSignUp(actor, input);
  changed(input.productionId);
});

export const relistSignUp = defineAction({ input: signUpSchema }, async (input, actor) => {
  await signUpData.relistSignUp(actor, input);
  changed(input.productionId);
});

export const placeSinger = defineAction({ input: placeSingerSchema }, async (input, actor) => {
  await placeData.placeSinger(actor, input);
  changed(input.productionId);
});

export const swapSingers = defineAction({ input: swapSingersSchema }, async (input, actor) => {
  await placeData.swapSingers(actor, input);
  changed(input.productionId);
});

export const takeOut = defineAction({ input: signUpSchema }, async (input, actor) => {
  await placeData.takeOut(actor, input);
  changed(input.productionId);
});

export const proposeFill = defineAction({ input: daySchema }, (input, actor) =>
  fillData.proposeFill(actor, input),
);

export const acceptFill = defineAction({ input: acceptFillSchema }, async (input, actor) => {
  const placed = await fillData.acceptFill(actor, input);
  changed(input.productionId);
  return { placed };
});

export const assignPianist = defineAction({ input: assignPianistSchema }, async (input, actor) => {
  const sessionId = await pianistData.assignPianist(actor, input);
  changed(input.productionId);
  return { sessionId };
});

export const removePianist = defineAction({ input: removePianistSchema }, async (input, actor) => {
  await pianistData.removePianist(actor, input);
  changed(input.productionId);
});

export const previewInvitations = defineAction({ input: inviteSingersSchema }, (input, actor) =>
  inviteData.previewInvitations(actor, input),
);

export const inviteSingers = defineAction({ input: inviteSingersSchema }, async (input, actor) => {
  const invited = await inviteData.inviteSingers(actor, input);
  changed(input.productionId);
  return { invited };
});

export const makeDoorLink = defineAction({ input: daySchema }, async (input, actor) => {
  const link = await doorLinkData.makeDoorLink(actor, input);
  changed(input.productionId);
  return { link };
});

export const revokeDoorLink = defineAction({ input: daySchema }, async (input, actor) => {
  await doorLinkData.revokeDoorLink(actor, input);
  changed(input.productionId);
});

export const hearRange = defineAction({ input: hearRangeSchema }, async (input, actor) => {
  await rangeData.hearRange(actor, input);
  changed(input.productionId);
});
