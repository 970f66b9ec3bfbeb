import { readFile } from "node:fs/promises";
import path from "node:path";
import ExcelJS from "exceljs";
import { strToU8, zipSync } from "fflate";
import { describe, expect, test } from "vitest";
import { readSingersSheet } from "@/lib/formats/xlsx/read-singers-sheet";
import { singersTemplate } from "@/lib/formats/xlsx/singers-template";

const fixtures = path.resolve(import.meta.dirname, "../../fixtures/sheets");
const fixture = async (name: string) =>
  readSingersSheet(await readFile(path.join(fixtures, name)), name);
const csv = (text: string) => readSingersSheet(strToU8(text), "singers.csv");
const one = async (headings: string, row: string) => {
  const sheet = await csv(`${headings}\n${row}\n`);
  return sheet.rows[0] ?? expect.fail(sheet.problems[0]?.message);
};

// Source of the expectations: the rows as typed in tests/fixtures/sheets/make-singers.ts; the third file
// was written by LibreOffice, not by the library that reads it.
describe.each(["singers.csv", "singers.xlsx", "singers-libreoffice.xlsx"])("%s", (name) => {
  test("40 singers can go in", async () => {
    const sheet = await fixture(name);
    expect(sheet.problems).toEqual([]);
    expect(sheet.unknownColumns).toEqual(["Shoe size"]);
    const fine = sheet.rows.filter((row) => row.problems.length === 0);
    expect([sheet.rows.length, fine.length]).toEqual([43, 40]);
    expect(fine[0]).toEqual({
      line: 2,
      values: {
        name: "Adaeze Holmgren",
        email: "adaeze.holmgren@singers.example",
        phone: "+00 555 100",
        pronouns: "she/her",
        role: "Soprano",
        song: "The Lost Chord",
        bars: 16,
        low: { midi: 60, spelling: "C4" },
        high: { midi: 81, spelling: "A5" },
        minor: false,
        notBefore: "10:30",
      },
      problems: [],
    });
    expect(fine[4]?.values).toMatchObject({
      name: "Beatriz Vanterpool",
      low: { midi: 56, spelling: "A♭3" },
      notAfter: "15:45",
    });
    expect(fine[7]?.values.song).toBe("Sweet and Low (second verse)");
    expect(fine.map((row) => row.values.name)).toEqual(
      expect.arrayContaining(["Søren Abimbola", "Żaneta Coldwell", "Dagný Ferreira"]),
    );
    expect(fine.filter((row) => row.values.minor).map((row) => row.line)).toEqual([7, 20, 36]);
  });

  test("3 rows say what is wrong and what to do", async () => {
    const { rows } = await fixture(name);
    const bad = rows.filter((row) => row.problems.length > 0);
    expect(
      bad.map((row) => [
        row.line,
        ...row.problems.map(({ field, message }) => `${field}: ${message}`),
      ]),
    ).toEqual([
      [
        22,
        "name: The name is missing. Write the name the singer uses.",
        "email: “nobody.at.singers.example” is not an e-mail address. Write it like name@example.org.",
      ],
      [23, "low: The lowest note, D4, is above the highest, E2. Swap or correct them."],
      [
        24,
        "low: “H9” is not a note. Write letter and octave, like A3, Bb3 or F#5 (C4 is middle C).",
        "bars: “a few” is not a number of bars. Write one whole number, like 32.",
        "email: This e-mail address is in line 2 already. Keep one of the two rows.",
      ],
    ]);
  });
});

describe("cells of a text table", () => {
  test.each([
    ["commas", "Name,Email\nWren Tallis,wren@singers.example"],
    ["semicolons", "Name;Email\nWren Tallis;wren@singers.example"],
    ["tabs", "Name\tEmail\nWren Tallis\twren@singers.example"],
    ["a declared delimiter", "sep=;\nName;Email\nWren Tallis;wren@singers.example"],
    ["a byte order mark", "\ufeffName,Email\r\nWren Tallis,wren@singers.example\r\n"],
    ["old line ends", "Name,Email\rWren Tallis,wren@singers.example\r"],
    ["quotes", '"Name","Email"\n"Wren Tallis","wren@singers.example"'],
    ["two name columns", "First name,Surname,Email\nWren,Tallis,wren@singers.example"],
    ["a title above", "Spring auditions,\n,\nName,Email\nWren Tallis,wren@singers.example"],
  ])("%s", async (_what, text) => {
    const { rows } = await csv(text);
    expect(rows.map((row) => row.values)).toEqual([
      { name: "Wren Tallis", email: "wren@singers.example" },
    ]);
  });

  test("the line is the row a spreadsheet shows, empty rows and all", async () => {
    const { rows } = await csv(
      "Name,Email\n\nWren,wren@singers.example\n,\nSabela,sabela@singers.example\n",
    );
    expect(rows.map((row) => row.line)).toEqual([3, 5]);
  });

  test.each([
    ["utf-8", Buffer.from("Name,Email\nZoë Núñez,z@singers.example", "utf8")],
    ["windows-1252", Buffer.from("Name,Email\nZoë Núñez,z@singers.example", "latin1")],
    [
      "utf-16 with a mark",
      Buffer.from("\ufeffName\tEmail\nZoë Núñez\tz@singers.example", "utf16le"),
    ],
    [
      "accents in two pieces",
      Buffer.from("Name,Email\nZoë Núñez,z@singers.example".normalize("NFD")),
    ],
  ])("%s", async (_what, bytes) => {
    const { rows } = await readSingersSheet(bytes, "singers.csv");
    expect(rows[0]?.values.name).toBe("Zoë Núñez");
  });

  test("a delimiter, a quote and a line break inside quotes", async () => {
    const row = await one(
      "Name,Email,Song",
      '"Tallis, Wren",wren@singers.example,"The ""Lost""\nChord"',
    );
    expect(row.values).toMatchObject({ name: "Tallis, Wren", song: 'The "Lost" Chord' });
  });

  test("a number written by our own CSV comes back without its guard", async () => {
    const row = await one("Name,Email,Phone", "Wren,wren@singers.example,'+00 555 014");
    expect(row.values.phone).toBe("+00 555 014");
  });
});

describe("what a cell means", () => {
  test.each([
    ["10:30", "10:30"],
    ["9", "09:00"],
    ["9.15", "09:15"],
    ["2pm", "14:00"],
    ["12:05 am", "00:05"],
    ["12 p.m.", "12:00"],
    ["25:00", undefined],
    ["13 pm", undefined],
    ["late", undefined],
  ])("a time %s is %s", async (text, time) => {
    const row = await one("Name,Email,Not before", `Wren,wren@singers.example,${text}`);
    expect(row.values.notBefore).toBe(time);
    expect(row.problems.map(({ field }) => field)).toEqual(time === undefined ? ["notBefore"] : []);
  });

  test.each([
    ["yes", true],
    ["Y", true],
    ["no", false],
    ["", undefined],
    ["15", undefined],
  ])("under 18 “%s” is %s", async (text, minor) => {
    const row = await one("Name,Email,Under 18?", `Wren,wren@singers.example,${text}`);
    expect(row.values.minor).toBe(minor);
    expect(row.problems).toHaveLength(text === "15" ? 1 : 0);
  });

  test.each([
    ["A3–E5", 57, 76],
    ["A3 to E5", 57, 76],
    ["Bb3-F#5", 58, 78],
  ])("a range %s in one cell", async (text, low, high) => {
    const row = await one("Name,Email,Vocal range", `Wren,wren@singers.example,${text}`);
    expect([row.values.low?.midi, row.values.high?.midi]).toEqual([low, high]);
  });

  test("times that leave nothing between them", async () => {
    const row = await one(
      "Name,Email,Not before,Not after",
      "Wren,wren@singers.example,15:00,12:00",
    );
    expect(row.problems).toEqual([
      {
        field: "notBefore",
        message: "Nothing lies between 15:00 and 12:00. Change one of the times.",
      },
    ]);
  });

  test("a text far too long", async () => {
    const row = await one("Name,Email,Song", `Wren,wren@singers.example,${"la ".repeat(100)}`);
    expect(row.problems.map(({ field }) => field)).toEqual(["song"]);
  });
});

describe("an .xlsx made elsewhere", () => {
  test("formulas give the value saved with them, links and rich text their text, times the time", async () => {
    const workbook = new ExcelJS.Workbook();
    workbook.addWorksheet("Read me").addRow(["Fill in the next sheet"]);
    const sheet = workbook.addWorksheet("Singers");
    sheet.addRow(["Name", "E-mail", "Song", "Bars", "Not before"]);
    const row = sheet.addRow([]);
    row.getCell(1).value = { formula: 'CONCATENATE("Wren"," Tallis")', result: "Wren Tallis" };
    row.getCell(2).value = {
      text: "wren@singers.example",
      hyperlink: "mailto:wren@singers.example",
    };
    row.getCell(3).value = {
      richText: [{ text: "The " }, { text: "Lost Chord", font: { italic: true } }],
    };
    row.getCell(4).value = { formula: "16*2", result: 32 };
    row.getCell(5).value = new Date("1899-12-30T10:30:00Z");
    row.getCell(5).numFmt = "hh:mm";
    sheet.mergeCells("A4:E4");
    const read = await readSingersSheet(
      new Uint8Array(await workbook.xlsx.writeBuffer()),
      "mine.xlsx",
    );
    expect(read.rows.map(({ values }) => values)).toEqual([
      {
        name: "Wren Tallis",
        email: "wren@singers.example",
        song: "The Lost Chord",
        bars: 32,
        notBefore: "10:30",
      },
    ]);
  });

  test("the empty form reads back, and its example is not a singer", async () => {
    const { rows, unknownColumns, problems } = await readSingersSheet(
      await singersTemplate(),
      "form.xlsx",
    );
    expect([unknownColumns, problems]).toEqual([[], []]);
    expect(rows).toHaveLength(1);
    expect(rows[0]?.values).toMatchObject({
      bars: 32,
      low: { midi: 57 },
      high: { midi: 76 },
      notAfter: "16:00",
    });
    expect(rows[0]?.problems).toEqual([
      { field: "email", message: "This is the example from the form. Delete the row." },
    ]);
  });
});

describe("what is refused, with what to do", () => {
  const refusal = async (bytes: Uint8Array, name: string) => {
    const sheet = await readSingersSheet(bytes, name);
    expect(sheet.rows).toEqual([]);
    expect(sheet.problems).toHaveLength(1);
    return sheet.problems[0];
  };
  const rows = (count: number) =>
    strToU8(
      `Name,Email\n${Array.from({ length: count }, (_, i) => `A,a${String(i)}@singers.example\n`).join("")}`,
    );

  test.each([
    ["too-large", new Uint8Array(2 * 1024 * 1024 + 1), "big.csv"],
    ["too-many-rows", rows(2001), "many.csv"],
    ["too-many-rows", rows(50_000), "very-many.csv"],
    ["damaged", strToU8(`Name,Email\n${",".repeat(1_000_000)}`), "wide.csv"],
    ["not-a-spreadsheet", strToU8("%PDF-1.7\n"), "cut.pdf"],
    ["not-a-spreadsheet", strToU8("%PDF-1.7\n"), "cut.csv"],
    ["not-a-spreadsheet", strToU8("Name,Email\n"), "notes.docx"],
    ["not-a-spreadsheet", new Uint8Array([0, 1, 2, 0]), "binary.csv"],
    ["not-a-spreadsheet", new Uint8Array([0xd0, 0xcf, 0x11, 0xe0, 0xa1]), "old.xls"],
    ["not-a-spreadsheet", zipSync({ "word/document.xml": strToU8("<w/>") }), "letter.xlsx"],
    ["damaged", zipSync({ "xl/workbook.xml": strToU8("<workbook>") }), "half.xlsx"],
    ["damaged", new Uint8Array([0x50, 0x4b, 3, 4, 0, 0]), "stub.xlsx"],
    ["damaged", strToU8('Name,Email\n"Wren,wren@singers.example\n'), "quote.csv"],
    ["no-headings", strToU8("Wren,wren@singers.example\n"), "bare.csv"],
    ["no-headings", strToU8("Name,Phone\nWren,1\n"), "no-email.csv"],
    ["no-headings", strToU8(""), "empty.csv"],
    ["no-rows", strToU8("Name,Email\n"), "headings.csv"],
  ])("%s: %#", async (code, bytes, name) => {
    expect(await refusal(bytes, name)).toMatchObject({
      code,
      message: expect.stringMatching(/\. .*\.$/) as string,
    });
  });

  test("2,000 rows are not too many", async () => {
    expect((await readSingersSheet(rows(2000), "many.csv")).rows).toHaveLength(2000);
  });

  test("the missing heading is named", async () => {
    expect(await refusal(strToU8("Name,Phone\nWren,1\n"), "a.csv")).toMatchObject({
      message: expect.stringContaining("no column headed E-mail") as string,
    });
    expect(await refusal(strToU8("Email,Phone\na@b.example,1\n"), "a.csv")).toMatchObject({
      message: expect.stringContaining("no column headed Name") as string,
    });
  });
});
