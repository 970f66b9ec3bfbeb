import { defineRoute } from "@/lib/auth/define-route";
import { readDay } from "@/lib/data/auditions/day-view";
import { idField } from "@/lib/schemas/common";
import { AppError } from "@/lib/errors";

type Params = { productionId: string; dayId: string };

/** The audition day, read again every few seconds while somebody looks at it. */
export const GET = defineRoute<Params>((_request, actor, params) => {
  const productionId = idField.safeParse(params.productionId);
  const dayId = idField.safeParse(params.dayId);
  if (!productionId.success || !dayId.success) throw new AppError("not-found");
  return readDay(actor, productionId.data, dayId.data);
});
