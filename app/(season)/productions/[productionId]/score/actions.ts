"use server";

import { revalidatePath } from "next/cache";
import { defineAction } from "@/lib/auth/define-action";
import * as confirming from "@/lib/data/score/confirm";
import * as lineData from "@/lib/data/score/lines";
import * as numberData from "@/lib/data/score/numbers";
import * as roleData from "@/lib/data/score/roles";
import {
  addNumberSchema,
  addRoleSchema,
  changeNumberSchema,
  changeRoleSchema,
  confirmReadingSchema,
  lineIdSchema,
  moveNumberSchema,
  numberIdSchema,
  roleIdSchema,
  shiftPartSchema,
  writeLineSchema,
} from "@/lib/schemas/score";

/** Casting and rehearsals stand on the score: what changes here changes there. */
const changed = (productionId: string): void => {
  revalidatePath(`/productions/${productionId}`, "layout");
};

export const addNumber = defineAction({ input: addNumberSchema }, async (input, actor) => {
  const numberId = await numberData.addNumber(actor, input);
  changed(input.productionId);
  return { numberId };
});

export const changeNumber = defineAction({ input: changeNumberSchema }, async (input, actor) => {
  await numberData.changeNumber(actor, input);
  changed(input.productionId);
});

export const removeNumber = defineAction({ input: numberIdSchema }, async (input, actor) => {
  await numberData.removeNumber(actor, input);
  changed(input.productionId);
});

export const restoreNumber = defineAction({ input: numberIdSchema }, async (input, actor) => {
  await numberData.restoreNumber(actor, input);
  changed(input.productionId);
});

export const moveNumber = defineAction({ input: moveNumberSchema }, async (input, actor) => {
  await numberData.moveNumber(actor, input);
  changed(input.productionId);
});

export const addRole = defineAction({ input: addRoleSchema }, async (input, actor) => {
  const roleId = await roleData.addRole(actor, input);
  changed(input.productionId);
  return { roleId };
});

export const changeRole = defineAction({ input: changeRoleSchema }, async (input, actor) => {
  await roleData.changeRole(actor, input);
  changed(input.productionId);
});

export const removeRole = defineAction({ input: roleIdSchema }, async (input, actor) => {
  await roleData.removeRole(actor, input);
  changed(input.productionId);
});

export const restoreRole = defineAction({ input: roleIdSchema }, async (input, actor) => {
  await roleData.restoreRole(actor, input);
  changed(input.productionId);
});

export const writeLine = defineAction({ input: writeLineSchema }, async (input, actor) => {
  await lineData.writeLine(actor, input);
  changed(input.productionId);
});

export const removeLine = defineAction({ input: lineIdSchema }, async (input, actor) => {
  await lineData.removeLine(actor, input);
  changed(input.productionId);
});

export const shiftPart = defineAction({ input: shiftPartSchema }, async (input, actor) => {
  await lineData.shiftPart(actor, input);
  changed(input.productionId);
});

export const confirmReading = defineAction(
  { input: confirmReadingSchema },
  async (input, actor) => {
    const confirmed = await confirming.confirmReading(actor, input);
    changed(input.productionId);
    return confirmed;
  },
);
