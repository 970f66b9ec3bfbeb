import { defineRoute } from "@/lib/auth/define-route";
import { readCallClashes } from "@/lib/data/calls/read";
import { callAddressSchema } from "@/lib/schemas/calls";
import { AppError } from "@/lib/errors";

/** What a saved call clashes with now. */
export const GET = defineRoute<{ productionId: string; callId: string }>(
  (_request, actor, params) => {
    const address = callAddressSchema.safeParse(params);
    if (!address.success) throw new AppError("not-found");
    return readCallClashes(actor, address.data);
  },
);
