import { Readable } from "node:stream";
import ExcelJS from "exceljs";
import { unguardCell } from "./guard-cell";
import type { TableLine, TablesResult } from "./table-types";

/** Well above what is taken in, so that empty lines between rows do no harm. */
const MAX_LINES = 10_000;
const DELIMITERS = [",", ";", "\t"];

/**
 * A text table with commas, semicolons or tabs, in UTF-8 (with or without a mark), UTF-16 with a mark, or
 * windows-1252; quoted cells may hold the delimiter, quotes and new lines. A first line `sep=;` is heeded.
 */
export async function readCsvTable(bytes: Uint8Array): Promise<TablesResult> {
  const decoded = decode(bytes);
  if (decoded.includes("\0") || decoded.startsWith("%PDF")) {
    const message = "This is not a text table. Choose an .xlsx file, or save the sheet as CSV.";
    return { ok: false, problem: { code: "not-a-spreadsheet", message } };
  }
  const declared = /^sep=([,;\t])\r?\n/i.exec(decoded);
  const text = declared ? decoded.slice(declared[0].length) : decoded;
  const delimiter = declared?.[1] ?? guessDelimiter(text);
  const linesBefore = declared ? 1 : 0;

  const lines: TableLine[] = [];
  const workbook = new ExcelJS.Workbook();
  try {
    const sheet = await workbook.csv.read(Readable.from([text]), {
      parserOptions: { delimiter, ignoreEmpty: false, maxRows: MAX_LINES + 1 },
      // Keeps every cell the text it is: no number, date or formula is read into it.
      map: (value: unknown) => value,
    });
    sheet.eachRow((row, number) => {
      const cells = Array.from({ length: row.cellCount }, (_, index) => {
        const { value } = row.getCell(index + 1);
        return typeof value === "string" ? unguardCell(value) : "";
      });
      lines.push({ line: number + linesBefore, cells });
    });
  } catch {
    const message =
      "A quotation mark is never closed, or a row has no end. Save it as CSV again, or as .xlsx.";
    return { ok: false, problem: { code: "damaged", message } };
  }
  if ((lines.at(-1)?.line ?? 0) > MAX_LINES) {
    const message = `This file has over ${String(MAX_LINES)} lines. Keep only the list of singers, or split it.`;
    return { ok: false, problem: { code: "too-many-rows", message } };
  }
  return { ok: true, tables: [lines] };
}

function decode(bytes: Uint8Array): string {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return new TextDecoder("utf-16le").decode(bytes);
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return new TextDecoder("utf-16be").decode(bytes);
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    return new TextDecoder("windows-1252").decode(bytes);
  }
}

/** The delimiter met most often outside quotes in the first line that has one. */
function guessDelimiter(text: string): string {
  const counts = new Map(DELIMITERS.map((delimiter) => [delimiter, 0]));
  let quoted = false;
  for (const character of text) {
    if (character === '"') quoted = !quoted;
    if (quoted) continue;
    const count = counts.get(character);
    if (count !== undefined) counts.set(character, count + 1);
    if (character === "\n" && [...counts.values()].some((found) => found > 0)) break;
  }
  const [best] = [...counts].sort((a, b) => b[1] - a[1]);
  return best?.[0] ?? ",";
}
