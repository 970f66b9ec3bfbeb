import { defineRoute } from "@/lib/auth/define-route";
import { readIssue } from "@/lib/data/sheets/read";
import { AppError } from "@/lib/errors";
import { contentDisposition } from "@/lib/formats/content-disposition";
import { writeCallSheetCsv } from "@/lib/formats/xlsx/write-call-sheet-csv";
import { writeCallSheet } from "@/lib/formats/xlsx/write-call-sheet";
import { issueAddressSchema, sheetFileSchema } from "@/lib/schemas/sheets";

const MEDIA_TYPES = {
  xlsx: "application/vnd.openxmlformats-officedocument.spreadsheetml.sheet",
  csv: "text/csv; charset=utf-8",
} as const;

/** An issue as a file: `?format=xlsx` (the default) or `csv`, `?paper=A4` or `Letter` (the company's unless told). */
export const GET = defineRoute<{ productionId: string; issueId: string }>(
  async (request, actor, params) => {
    const address = issueAddressSchema.safeParse(params);
    if (!address.success) throw new AppError("not-found");
    const issue = await readIssue(actor, address.data);
    const asked = sheetFileSchema.safeParse(Object.fromEntries(new URL(request.url).searchParams));
    if (!asked.success) {
      throw new AppError(
        "invalid",
        "Ask for the format xlsx or csv, and for the paper A4 or Letter.",
      );
    }
    const { format, paper } = asked.data;
    const body =
      format === "csv"
        ? new TextEncoder().encode(writeCallSheetCsv(issue.sheet))
        : await writeCallSheet(issue.sheet, paper ?? issue.paper);
    const name = `${issue.sheet.productionTitle} ${issue.sheet.localDate}, issue ${issue.sheet.issueNumber}.${format}`;
    return new Response(new Uint8Array(body), {
      headers: {
        "content-type": MEDIA_TYPES[format],
        "content-disposition": contentDisposition(name),
        "x-content-type-options": "nosniff",
        "cache-control": "private, no-store",
      },
    });
  },
);
