import { defineRoute } from "@/lib/auth/define-route";
import { previewImport } from "@/lib/data/auditions/import-singers";
import { AppError } from "@/lib/errors";
import { readUpload } from "@/lib/formats/multipart/read-upload";
import { idField } from "@/lib/schemas/common";

const RULES = {
  maxBytes: 2 * 1024 * 1024,
  tooLarge: "This file is over 2 MB. Remove pictures and other sheets, or save it as CSV.",
  missing: "Choose an .xlsx or .csv file first.",
};

/** A list of singers as .xlsx or .csv in the form field "file"; answers with what each row would become and writes nothing. */
export const POST = defineRoute<{ productionId: string }>(async (request, actor, params) => {
  const productionId = idField.safeParse(params.productionId);
  if (!productionId.success) throw new AppError("not-found");
  return previewImport(actor, productionId.data, await readUpload(request, RULES));
});
