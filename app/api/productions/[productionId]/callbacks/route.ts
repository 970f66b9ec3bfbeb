import { defineRoute } from "@/lib/auth/define-route";
import { previewPublish } from "@/lib/data/callbacks/publish";
import { readCallbacks } from "@/lib/data/callbacks/draft";

/** The draft list with its marks, and (for who may publish) what publishing now would do. */
export const GET = defineRoute<{ productionId: string }>(async (_request, actor, { productionId }) => {
  const draft = await readCallbacks(actor, productionId);
  return { ...draft, preview: draft.may.publish ? await previewPublish(actor, productionId) : null };
});
