import type { SheetProblem } from "./types";

/** A row of text cells; `line` is the row number that a spreadsheet shows, from 1. */
export interface TableLine {
  line: number;
  cells: string[];
}

export type TablesResult =
  { ok: true; tables: TableLine[][] } | { ok: false; problem: SheetProblem };
