"use server";

import { revalidatePath } from "next/cache";
import { defineAction } from "@/lib/auth/define-action";
import * as issueData from "@/lib/data/sheets/issues";
import { issueSheetSchema } from "@/lib/schemas/sheets";

export const issueSheet = defineAction({ input: issueSheetSchema }, async (input, actor) => {
  const issued = await issueData.issueSheet(actor, input);
  revalidatePath(`/productions/${input.productionId}/call-sheets`, "layout");
  return issued;
});
