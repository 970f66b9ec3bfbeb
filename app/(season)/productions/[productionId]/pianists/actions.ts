"use server";

import { revalidatePath } from "next/cache";
import { defineAction } from "@/lib/auth/define-action";
import { assignCallPianist as assign } from "@/lib/data/pianists/assign";
import { assignCallPianistSchema } from "@/lib/schemas/pianists";

export const assignCallPianist = defineAction(
  { input: assignCallPianistSchema },
  async (input, actor) => {
    await assign(actor, input);
    revalidatePath(`/productions/${input.productionId}`, "layout");
  },
);
