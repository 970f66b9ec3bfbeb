import ExcelJS from "exceljs";
import { EXAMPLE_SINGER, SINGER_HEADINGS } from "./singer-headings";

/** An empty form for a list of singers: an .xlsx with the headings and one invented example row. */
export async function singersTemplate(): Promise<Uint8Array> {
  const workbook = new ExcelJS.Workbook();
  const sheet = workbook.addWorksheet("Singers", { views: [{ state: "frozen", ySplit: 1 }] });
  const columns = SINGER_HEADINGS.filter(({ label }) => label !== null);
  sheet.addRow(columns.map(({ label }) => label)).font = { name: "Calibri", size: 11, bold: true };
  sheet.addRow(columns.map(({ meaning }) => EXAMPLE_SINGER[meaning] ?? "")).font = {
    name: "Calibri",
    size: 11,
    italic: true,
  };
  sheet.columns.forEach((column) => {
    column.width = 18;
    // Text, so that a spreadsheet keeps "10:30" and a phone's leading zeros as they are typed.
    column.numFmt = "@";
  });
  return new Uint8Array(await workbook.xlsx.writeBuffer());
}
