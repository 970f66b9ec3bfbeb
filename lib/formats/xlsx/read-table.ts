import { readCsvTable } from "./read-csv-table";
import { readXlsxTables } from "./read-xlsx-tables";
import type { TablesResult } from "./table-types";
import type { SheetProblem } from "./types";

const MAX_BYTES = 2 * 1024 * 1024;
const TEXT_NAMES = /\.(csv|tsv|tab|txt)$/i;
const ZIP = [0x50, 0x4b, 0x03, 0x04];
/** Old spreadsheets (.xls), and new ones locked with a password, share this beginning. */
const OLD_OFFICE = [0xd0, 0xcf, 0x11, 0xe0];

/**
 * The tables of a spreadsheet as text, one per visible sheet; a text file has one. What the file is
 * goes by its content: the name only says whether text is meant as a table. Never throws for a file's
 * content; a file over 2 MB or of another kind comes back as a problem.
 */
export async function readTables(bytes: Uint8Array, fileName: string): Promise<TablesResult> {
  if (bytes.length > MAX_BYTES) {
    return refuse(
      "too-large",
      "This file is over 2 MB. Remove pictures and other sheets, or save it as CSV.",
    );
  }
  if (startsWith(bytes, ZIP)) return readXlsxTables(bytes);
  if (startsWith(bytes, OLD_OFFICE)) {
    return refuse(
      "not-a-spreadsheet",
      "This is an old or locked spreadsheet. Open it, take the password off, and save it as .xlsx or .csv.",
    );
  }
  if (TEXT_NAMES.test(fileName)) return readCsvTable(bytes);
  return refuse("not-a-spreadsheet", "This is not a spreadsheet. Choose an .xlsx or .csv file.");
}

function startsWith(bytes: Uint8Array, beginning: readonly number[]): boolean {
  return beginning.every((byte, index) => bytes[index] === byte);
}

function refuse(code: SheetProblem["code"], message: string): TablesResult {
  return { ok: false, problem: { code, message } };
}
