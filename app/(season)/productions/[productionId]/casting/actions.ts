"use server";

import { revalidatePath } from "next/cache";
import { defineAction } from "@/lib/auth/define-action";
import * as choosing from "@/lib/data/casting/choose";
import * as grid from "@/lib/data/casting/grid";
import { chooseSchema, fitSchema, publishCastSchema } from "@/lib/schemas/casting";

export const choose = defineAction({ input: chooseSchema }, async (input, actor) => {
  await choosing.choose(actor, input);
  revalidatePath(`/productions/${input.productionId}/casting`);
});

export const publishCast = defineAction({ input: publishCastSchema }, async (input, actor) => {
  await choosing.publishCast(actor, input);
  revalidatePath(`/productions/${input.productionId}`, "layout");
});

/** The range fit of one singer in one role, number by number. */
export const computeFit = defineAction({ input: fitSchema }, (input, actor) =>
  grid.computeFit(actor, input),
);
