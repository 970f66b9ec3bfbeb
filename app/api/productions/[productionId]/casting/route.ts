import { defineRoute } from "@/lib/auth/define-route";
import { readCastingGrid } from "@/lib/data/casting/grid";

/** The casting grid. */
export const GET = defineRoute<{ productionId: string }>((_request, actor, { productionId }) =>
  readCastingGrid(actor, productionId),
);
