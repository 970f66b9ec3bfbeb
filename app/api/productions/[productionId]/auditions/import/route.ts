import { defineRoute } from "@/lib/auth/define-route";
import { previewImport } from "@/lib/data/auditions/import-singers";
import { AppError } from "@/lib/errors";
import { idField } from "@/lib/schemas/common";
import { readUpload } from "./read-upload";

const MAX_BYTES = 2 * 1024 * 1024;

/** A list of singers as .xlsx or .csv in the form field "file"; answers with what each row would become and writes nothing. */
export const POST = defineRoute<{ productionId: string }>(async (request, actor, params) => {
  const productionId = idField.safeParse(params.productionId);
  if (!productionId.success) throw new AppError("not-found");
  return previewImport(actor, productionId.data, await readUpload(request, MAX_BYTES));
});
