import { readFile } from "node:fs/promises";
import path from "node:path";
import { strFromU8, strToU8, unzipSync, zipSync } from "fflate";
import { describe, expect, test } from "vitest";
import { readSingersSheet } from "@/lib/formats/xlsx/read-singers-sheet";

const file = path.resolve(import.meta.dirname, "../../fixtures/sheets/singers.xlsx");
const parts = unzipSync(await readFile(file));
const SHEET = "xl/worksheets/sheet1.xml";
const WORKBOOK = "xl/workbook.xml";
const xml = (name: string) => strFromU8(parts[name] ?? new Uint8Array());

const withPart = (name: string, text: string) => zipSync({ ...parts, [name]: strToU8(text) });
const insert = (name: string, before: string, text: string) => {
  const changed = xml(name).replace(before, `${text}${before}`);
  expect(changed).not.toBe(xml(name));
  return withPart(name, changed);
};
const timed = async (bytes: Uint8Array) => {
  const started = performance.now();
  const sheet = await readSingersSheet(bytes, "singers.xlsx");
  return { sheet, seconds: (performance.now() - started) / 1000 };
};

describe("files made to fill memory or time", () => {
  test("30 MB packed into a few kilobytes is refused before it is unpacked", async () => {
    const bomb = withPart(SHEET, `${xml(SHEET)}${" ".repeat(30 * 1024 * 1024)}`);
    expect(bomb.length).toBeLessThan(100_000);
    const { sheet } = await timed(bomb);
    expect(sheet.problems[0]?.code).toBe("too-large");
  });

  test("a file that lies about its size gets no more room than it said", async () => {
    const bomb = withPart(SHEET, " ".repeat(30 * 1024 * 1024));
    const lying = bomb.slice();
    const view = new DataView(lying.buffer);
    let changed = 0;
    for (let at = 0; at < lying.length - 46; at += 1) {
      const isDirectoryEntry = view.getUint32(at, true) === 0x02014b50;
      if (isDirectoryEntry && view.getUint32(at + 24, true) === 30 * 1024 * 1024) {
        view.setUint32(at + 24, 1000, true);
        changed += 1;
      }
    }
    expect(changed).toBe(1);
    const { sheet, seconds } = await timed(lying);
    expect(sheet.problems[0]?.code).toBe("damaged");
    expect(seconds).toBeLessThan(5);
  });

  test.each([
    [
      "a merge over every cell",
      insert(SHEET, "<pageMargins", '<mergeCells><mergeCell ref="A1:XFD1048576"/></mergeCells>'),
    ],
    [
      "a validation over every cell",
      insert(
        SHEET,
        "<pageMargins",
        '<dataValidations><dataValidation type="list" sqref="A1:XFD1048576"><formula1>"a"</formula1></dataValidation></dataValidations>',
      ),
    ],
    [
      "a name over every cell",
      insert(
        WORKBOOK,
        "<calcPr",
        '<definedNames><definedName name="all">Sheet!$A$1:$XFD$1048576</definedName></definedNames>',
      ),
    ],
    [
      "a column as wide as a continent",
      insert(SHEET, "<sheetData", '<cols><col min="1" max="2000000000" width="9"/></cols>'),
    ],
    [
      "a row very far down",
      insert(
        SHEET,
        "</sheetData>",
        '<row r="4000000000"><c r="A4000000000" t="str"><v>x</v></c></row>',
      ),
    ],
    ["pictures", zipSync({ ...parts, "xl/media/image1.png": new Uint8Array(9 * 1024 * 1024) })],
  ])("%s is passed over: the 43 rows are read in seconds", async (_what, bytes) => {
    const { sheet, seconds } = await timed(bytes);
    expect(sheet.rows).toHaveLength(43);
    expect(seconds).toBeLessThan(5);
  });

  test("entities that would unfold a thousandfold are not unfolded", async () => {
    const lol = `<?xml version="1.0"?><!DOCTYPE x [<!ENTITY a "${"ha".repeat(500)}"><!ENTITY b "${"&a;".repeat(1000)}">]>`;
    const changed = xml(SHEET)
      .replace(/^<\?xml[^>]*\?>/, lol)
      .replace("</sheetData>", '<row r="99"><c r="A99" t="str"><v>&b;</v></c></row></sheetData>');
    const { sheet, seconds } = await timed(withPart(SHEET, changed));
    expect(JSON.stringify(sheet).length).toBeLessThan(100_000);
    expect(seconds).toBeLessThan(5);
  });
});
