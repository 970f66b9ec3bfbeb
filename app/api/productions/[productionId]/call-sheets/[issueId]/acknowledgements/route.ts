import { defineRoute } from "@/lib/auth/define-route";
import { listAcknowledgements } from "@/lib/data/sheets/read";
import { AppError } from "@/lib/errors";
import { issueAddressSchema } from "@/lib/schemas/sheets";

/** Who has acknowledged an issue, and who has not. */
export const GET = defineRoute<{ productionId: string; issueId: string }>(
  (_request, actor, params) => {
    const address = issueAddressSchema.safeParse(params);
    if (!address.success) throw new AppError("not-found");
    return listAcknowledgements(actor, address.data);
  },
);
