import { defineRoute } from "@/lib/auth/define-route";
import { importTemplate } from "@/lib/data/auditions/import-singers";
import { AppError } from "@/lib/errors";
import { idField } from "@/lib/schemas/common";

/** The empty form for a list of singers, to download. */
export const GET = defineRoute<{ productionId: string }>(async (_request, actor, params) => {
  const productionId = idField.safeParse(params.productionId);
  if (!productionId.success) throw new AppError("not-found");
  const bytes = await importTemplate(actor, productionId.data);
  return new Response(new Blob([new Uint8Array(bytes)]), {
    headers: {
      "content-type": "application/vnd.openxmlformats-officedocument.spreadsheetml.sheet",
      "content-disposition": 'attachment; filename="singers.xlsx"',
      "cache-control": "private, no-store",
    },
  });
});
