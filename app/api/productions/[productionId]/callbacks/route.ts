import { defineRoute } from "@/lib/auth/define-route";
import { readCallbacks } from "@/lib/data/callbacks/draft";

/** The draft list with its marks and fits, and (for who may publish) what publishing now would do. */
export const GET = defineRoute<{ productionId: string }>((_request, actor, { productionId }) =>
  readCallbacks(actor, productionId),
);
