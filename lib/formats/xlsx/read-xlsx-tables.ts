import ExcelJS from "exceljs";
import { strFromU8, strToU8, unzipSync, zipSync, type Unzipped } from "fflate";
import type { TableLine, TablesResult } from "./table-types";
import type { SheetProblem } from "./types";

const MAX_UNPACKED_BYTES = 8 * 1024 * 1024;
const MAX_ENTRIES = 2000;
const LAST_ROW = 1_048_576;
const MAX_COLUMNS = 200;
const WORKBOOK = "xl/workbook.xml";
/** The parts that hold cells. Pictures, comments, tables and links are never unpacked. */
const WANTED =
  /^(\[Content_Types\]\.xml|_rels\/\.rels|xl\/(workbook|sharedStrings|styles)\.xml|xl\/_rels\/workbook\.xml\.rels|xl\/worksheets\/sheet\d+\.xml)$/;
/** Everything in a sheet but its rows. Some of these name ranges that would be filled cell by cell. */
const IGNORED_NODES = [
  "cols",
  "mergeCells",
  "dataValidations",
  "conditionalFormatting",
  "hyperlinks",
  "autoFilter",
  "drawing",
  "legacyDrawing",
  "picture",
  "tableParts",
  "extLst",
  "rowBreaks",
  "headerFooter",
];

/**
 * The visible sheets of an .xlsx file as text cells. Formulas are never worked out: the value saved with
 * them counts. At most 8 MB are unpacked, whatever the file says about itself: each part is unpacked
 * into a space of its declared size, and the declared sizes are added up first.
 */
export async function readXlsxTables(bytes: Uint8Array): Promise<TablesResult> {
  const parts = unpack(bytes);
  if ("problem" in parts) return { ok: false, problem: parts.problem };
  const workbook = new ExcelJS.Workbook();
  try {
    const safe = zipSync(parts.entries, { level: 0 });
    await workbook.xlsx.load(toArrayBuffer(safe), { ignoreNodes: IGNORED_NODES });
  } catch {
    return { ok: false, problem: damaged() };
  }
  const visible = workbook.worksheets.filter((sheet) => sheet.state === "visible");
  return { ok: true, tables: visible.map(linesOf) };
}

function unpack(bytes: Uint8Array): { entries: Unzipped } | { problem: SheetProblem } {
  let unpackedBytes = 0;
  let count = 0;
  const names = new Set<string>();
  let entries: Unzipped;
  try {
    // First the directory alone, so that nothing is unpacked from a file that would be refused.
    unzipSync(bytes, {
      filter: ({ name, size, originalSize }) => {
        count += 1;
        names.add(name);
        // Parts may share their packed bytes, so what is copied out counts as well as what is declared.
        if (WANTED.test(name)) unpackedBytes += Math.max(size, originalSize);
        return false;
      },
    });
    if (!names.has(WORKBOOK)) {
      const message =
        "This is not an .xlsx spreadsheet. Open it where it was made and save it as .xlsx or .csv.";
      return { problem: { code: "not-a-spreadsheet", message } };
    }
    if (unpackedBytes > MAX_UNPACKED_BYTES || count > MAX_ENTRIES) {
      const message =
        "This spreadsheet unpacks to far more than a list of singers. Save only that list.";
      return { problem: { code: "too-large", message } };
    }
    entries = unzipSync(bytes, { filter: ({ name }) => WANTED.test(name) });
  } catch {
    return { problem: damaged() };
  }
  const workbook = entries[WORKBOOK];
  if (!workbook) return { problem: damaged() };
  // Named ranges would be filled cell by cell too; under another name the reader passes over them.
  const withoutNames = strFromU8(workbook).replaceAll("definedName", "passedOver");
  return { entries: { ...entries, [WORKBOOK]: strToU8(withoutNames) } };
}

function linesOf(sheet: ExcelJS.Worksheet): TableLine[] {
  const lines: TableLine[] = [];
  const last = Math.min(sheet.lastRow?.number ?? 0, LAST_ROW);
  for (let line = 1; line <= last; line += 1) {
    const row = sheet.findRow(line);
    if (!row?.hasValues) continue;
    const width = Math.min(row.cellCount, MAX_COLUMNS);
    const cells = Array.from({ length: width }, (_, index) => textOf(row.getCell(index + 1).value));
    lines.push({ line, cells });
  }
  return lines;
}

function textOf(value: ExcelJS.CellValue): string {
  if (value === null || value === undefined) return "";
  if (value instanceof Date) return textOfDate(value);
  if (typeof value !== "object") return String(value);
  if ("richText" in value) return value.richText.map((run) => run.text).join("");
  if ("error" in value) return value.error;
  if ("formula" in value || "sharedFormula" in value) return textOf(value.result);
  return "text" in value ? value.text : "";
}

/** A time of day is kept as a date in 1899 or 1900; any other date as its calendar day. */
function textOfDate(value: Date): string {
  if (Number.isNaN(value.getTime())) return "";
  const rounded = new Date(Math.round(value.getTime() / 60_000) * 60_000).toISOString();
  return rounded < "1900-01-02" ? rounded.slice(11, 16) : rounded.slice(0, 10);
}

function toArrayBuffer(bytes: Uint8Array): ArrayBuffer {
  const copy = new ArrayBuffer(bytes.length);
  new Uint8Array(copy).set(bytes);
  return copy;
}

function damaged(): SheetProblem {
  const message =
    "This spreadsheet is damaged or unfinished. Open it, save it again and try once more.";
  return { code: "damaged", message };
}
