import { defineRoute } from "@/lib/auth/define-route";
import { productionFor } from "@/lib/data/guard";
import { keepScore } from "@/lib/data/score/read-file";
import { AppError } from "@/lib/errors";
import { readUpload } from "@/lib/formats/multipart/read-upload";
import { idField } from "@/lib/schemas/common";

const RULES = {
  maxBytes: 20 * 1024 * 1024,
  tooLarge: "This file is over 20 MB. Export it number by number, or compressed (.mxl).",
  missing: "Choose a .musicxml, .xml or .mxl file first.",
};

/**
 * A score as .musicxml, .xml or .mxl in the form field "file", and its SHA-256 in "sha256" where the sender could compute
 * it. Reads and keeps it, and answers with the reading's id and what was kept; nothing of the production's numbers, roles
 * and lines changes.
 */
export const POST = defineRoute<{ productionId: string }>(async (request, actor, params) => {
  const productionId = idField.safeParse(params.productionId);
  if (!productionId.success) throw new AppError("not-found");
  // Asked before 20 MB are taken in, and again where the file is kept.
  await productionFor(actor, productionId.data, "score:change");
  const { bytes, name, field } = await readUpload(request, RULES);
  return keepScore(actor, productionId.data, { bytes, name, sha256: field("sha256") });
});
