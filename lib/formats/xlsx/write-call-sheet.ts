import ExcelJS from "exceljs";
import type { CallSheet } from "@/lib/call-sheets/types";
import { BLOCK_HEADINGS, callSheetText } from "./call-sheet-text";
import type { PaperSize } from "./types";

/** Characters per column; together about what a landscape page holds at full size. */
const WIDTHS = [13, 32, 10, 44, 16, 16];
const LAST_COLUMN = WIDTHS.length;
const TEXT_WIDTH = WIDTHS.slice(1).reduce((sum, width) => sum + width, 0);
const LINE_POINTS = 15;
const FONT = { name: "Calibri", size: 11 };
/** ECMA-376 Part 1, 18.3.1.63: 1 is Letter, 9 is A4. */
const PAPER = { Letter: 1, A4: 9 } as const;
/** Inches; printers leave a quarter inch at most, the rest is room for a pencil. */
const MARGINS = { left: 0.5, right: 0.5, top: 0.6, bottom: 0.7, header: 0.3, footer: 0.3 };

/**
 * A call sheet as an .xlsx: what changed first, one row per block, then releases, music, tomorrow and
 * notes. Set up to print on `paper`, landscape, one page wide, with the headings on every page and pages
 * numbered. Every cell is text: one that begins with = + - @ stays what it says and is never worked out.
 */
export async function writeCallSheet(sheet: CallSheet, paper: PaperSize): Promise<Uint8Array> {
  const text = callSheetText(sheet);
  const workbook = new ExcelJS.Workbook();
  workbook.creator = sheet.companyName;
  workbook.title = `${text.production}, ${text.date}`;
  workbook.created = new Date(sheet.issuedAt);
  workbook.modified = new Date(sheet.issuedAt);
  const page = workbook.addWorksheet("Call sheet", {
    pageSetup: {
      orientation: "landscape",
      fitToPage: true,
      fitToWidth: 1,
      fitToHeight: 0,
      margins: MARGINS,
    },
    headerFooter: { oddFooter: footer(text.production, text.date, text.issue) },
    properties: { defaultRowHeight: LINE_POINTS },
  });
  // The library's list of papers leaves Letter out, although it writes the number it is given.
  Object.assign(page.pageSetup, { paperSize: PAPER[paper] });
  page.columns = WIDTHS.map((width) => ({ width, style: { numFmt: "@" } }));

  addWide(page, text.production, { size: 14, italic: true });
  addWide(page, text.date, { size: 18, bold: true });
  addWide(page, text.company, {});
  addWide(page, text.issue, {});
  addSections(page, text.sections.filter(isChange));
  page.addRow([]);

  const headings = page.addRow([...BLOCK_HEADINGS]);
  headings.font = { ...FONT, bold: true };
  headings.eachCell((cell) => {
    cell.border = { bottom: { style: "medium" } };
  });
  page.pageSetup.printTitlesRow = `${String(headings.number)}:${String(headings.number)}`;
  for (const block of text.blocks) addBlock(page, block);

  page.addRow([]);
  addSections(
    page,
    text.sections.filter((section) => !isChange(section)),
  );
  return new Uint8Array(await workbook.xlsx.writeBuffer());
}

type Section = { heading: string; lines: string[] };

function isChange({ heading }: Section): boolean {
  return heading === "Changed";
}

function addWide(page: ExcelJS.Worksheet, text: string, font: Partial<ExcelJS.Font>): void {
  const row = page.addRow([text]);
  row.font = { ...FONT, ...font };
  row.height = 1.4 * (font.size ?? FONT.size);
  page.mergeCells(row.number, 1, row.number, LAST_COLUMN);
}

function addBlock(page: ExcelJS.Worksheet, cells: string[]): void {
  const row = page.addRow(cells);
  row.height =
    LINE_POINTS * Math.max(...cells.map((cell, index) => lineCount(cell, WIDTHS[index] ?? 10)));
  row.eachCell({ includeEmpty: true }, (cell) => {
    cell.alignment = { wrapText: true, vertical: "top" };
    cell.border = { bottom: { style: "thin" } };
  });
  row.getCell(1).font = { ...FONT, bold: true };
}

function addSections(page: ExcelJS.Worksheet, sections: Section[]): void {
  for (const { heading, lines } of sections) {
    for (const [index, line] of lines.entries()) {
      const row = page.addRow([index === 0 ? heading : "", line]);
      // Spreadsheets do not grow a row to fit merged cells, so its height is worked out here.
      row.height = LINE_POINTS * lineCount(line, TEXT_WIDTH);
      row.getCell(1).font = { ...FONT, bold: true };
      page.mergeCells(row.number, 2, row.number, LAST_COLUMN);
      for (const column of [1, 2]) {
        row.getCell(column).alignment = { wrapText: true, vertical: "top" };
      }
    }
  }
}

/**
 * How many lines a text takes in a column so many digits wide, broken between words. Letters are on
 * average narrower than digits, so this is never too few by much more than a long capitalised word.
 */
function lineCount(text: string, width: number): number {
  let lines = 0;
  for (const paragraph of text.split("\n")) {
    lines += 1;
    let used = 0;
    for (const { length } of paragraph.split(" ")) {
      if (used > 0 && used + 1 + length > width) {
        lines += 1;
        used = 0;
      }
      lines += Math.max(0, Math.ceil(length / width) - 1);
      used += (used > 0 ? 1 : 0) + Math.min(length, width);
    }
  }
  return lines;
}

/** An ampersand starts a code in a footer, and all of it may have 255 characters. */
function footer(production: string, date: string, issue: string): string {
  const safe = (text: string) => Array.from(text).slice(0, 60).join("").replaceAll("&", "&&");
  return `&L${safe(production)}, ${safe(date)}&C${safe(issue.split(", ")[0] ?? "")}&RPage &P of &N`;
}
