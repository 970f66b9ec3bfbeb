import { readSingerRow } from "./read-singer-row";
import { readTables } from "./read-table";
import { meaningOfHeading, type ColumnMeaning } from "./singer-headings";
import type { TableLine } from "./table-types";
import type { SheetProblem, SingerRow, SingersSheet } from "./types";

const MAX_ROWS = 2000;
/** A title and a note may stand above the headings. */
const HEADINGS_WITHIN = 10;

/**
 * Reads a list of singers from an .xlsx or .csv file: each row with its line number, its values and what
 * is wrong with it. The rows without problems can go in while the others are put right. A file that is
 * too large (2 MB, 2,000 rows), no spreadsheet, or without headings has no rows and says why in `problems`.
 * `fileName` only tells text tables from other text. Never throws for what is in the file.
 */
export async function readSingersSheet(bytes: Uint8Array, fileName: string): Promise<SingersSheet> {
  const read = await readTables(bytes, fileName);
  if (!read.ok) return refused(read.problem);

  const found = read.tables.map(findHeadings).find((table) => table !== null);
  if (!found) return refused(missingHeadings(read.tables));

  const lines = found.lines.filter(({ cells }) => cells.some((cell) => cell.trim() !== ""));
  if (lines.length > MAX_ROWS) {
    return refused({
      code: "too-many-rows",
      message: `This sheet has ${String(lines.length)} rows; ${String(MAX_ROWS)} are the most. Split it in two.`,
    });
  }
  if (lines.length === 0) {
    return refused({
      code: "no-rows",
      message: "There are headings but no singers. Add one singer a row and choose the file again.",
    });
  }
  return {
    rows: readRows(lines, found.columns),
    unknownColumns: found.unknownColumns,
    problems: [],
  };
}

function refused(problem: SheetProblem): SingersSheet {
  return { rows: [], unknownColumns: [], problems: [problem] };
}

interface HeadedTable {
  columns: Map<ColumnMeaning, number>;
  unknownColumns: string[];
  lines: TableLine[];
}

function findHeadings(table: TableLine[]): HeadedTable | null {
  for (const [index, { cells }] of table.slice(0, HEADINGS_WITHIN).entries()) {
    const columns = new Map<ColumnMeaning, number>();
    const unknownColumns: string[] = [];
    for (const [column, cell] of cells.entries()) {
      const meaning = meaningOfHeading(cell);
      if (meaning !== null && !columns.has(meaning)) columns.set(meaning, column);
      else if (cell.trim() !== "") unknownColumns.push(cell.trim());
    }
    const hasName = columns.has("name") || columns.has("givenName") || columns.has("familyName");
    if (hasName && columns.has("email")) {
      return { columns, unknownColumns, lines: table.slice(index + 1) };
    }
  }
  return null;
}

function missingHeadings(tables: TableLine[][]): SheetProblem {
  const meanings = tables
    .flatMap((table) => table.slice(0, HEADINGS_WITHIN))
    .flatMap(({ cells }) => cells.map(meaningOfHeading));
  const advice = "Give the first row the headings Name and E-mail, or start from the empty form.";
  if (meanings.includes("email")) {
    return { code: "no-headings", message: `There is no column headed Name. ${advice}` };
  }
  if (meanings.includes("name") || meanings.includes("familyName")) {
    return { code: "no-headings", message: `There is no column headed E-mail. ${advice}` };
  }
  return { code: "no-headings", message: `The columns have no headings. ${advice}` };
}

function readRows(lines: TableLine[], columns: Map<ColumnMeaning, number>): SingerRow[] {
  const lineOfEmail = new Map<string, number>();
  return lines.map(({ line, cells }) => {
    const byMeaning = new Map(
      [...columns].map(([meaning, column]) => [meaning, cells[column] ?? ""] as const),
    );
    const { values, problems } = readSingerRow(byMeaning);
    const address = values.email.toLowerCase();
    const first = lineOfEmail.get(address);
    if (first !== undefined) {
      problems.push({
        field: "email",
        message: `This e-mail address is in line ${String(first)} already. Keep one of the two rows.`,
      });
    } else if (address !== "") lineOfEmail.set(address, line);
    return { line, values, problems };
  });
}
