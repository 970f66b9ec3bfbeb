"use server";

import { revalidatePath } from "next/cache";
import { defineAction } from "@/lib/auth/define-action";
import * as productionData from "@/lib/data/productions";
import {
  changeProductionSchema,
  createCompanySchema,
  createProductionSchema,
} from "@/lib/schemas/productions";

export const createCompany = defineAction({ input: createCompanySchema }, async (input, actor) => {
  const companyId = await productionData.createCompany(actor, input);
  revalidatePath("/season");
  return { companyId };
});

export const createProduction = defineAction(
  { input: createProductionSchema },
  async (input, actor) => {
    const productionId = await productionData.createProduction(actor, input);
    revalidatePath("/season");
    return { productionId };
  },
);

export const changeProduction = defineAction(
  { input: changeProductionSchema },
  async (input, actor) => {
    await productionData.changeProduction(actor, input);
    revalidatePath(`/productions/${input.productionId}`, "layout");
  },
);
