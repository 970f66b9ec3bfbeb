import { execFileSync } from "node:child_process";
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { strFromU8, unzipSync } from "fflate";
import { SaxesParser } from "saxes";
import { beforeAll, describe, expect, test } from "vitest";
import type { PaperSize } from "@/lib/formats/xlsx/types";
import { writeCallSheet } from "@/lib/formats/xlsx/write-call-sheet";
import { writeCallSheetCsv } from "@/lib/formats/xlsx/write-call-sheet-csv";
import { drawnCallSheet } from "../../fixtures/sheets/drawn-call-sheet";

/** The workbook's XML read by an XML reader of its own, not by the library that wrote it. */
function elements(xml: string) {
  const found: { name: string; attributes: Record<string, string>; text: string }[] = [];
  const open: typeof found = [];
  const parser = new SaxesParser();
  parser.on("opentag", (tag) => {
    const element = {
      name: tag.name,
      attributes: tag.attributes as Record<string, string>,
      text: "",
    };
    found.push(element);
    open.push(element);
  });
  parser.on("text", (text) => {
    for (const element of open) element.text += text;
  });
  parser.on("closetag", () => {
    open.pop();
  });
  parser.write(xml).close();
  return found;
}

async function unpacked(paper: PaperSize) {
  const parts = unzipSync(await writeCallSheet(drawnCallSheet, paper));
  const read = (name: string) => elements(strFromU8(parts[name] ?? new Uint8Array()));
  const strings = read("xl/sharedStrings.xml")
    .filter(({ name }) => name === "si")
    .map(({ text }) => text);
  const sheet = read("xl/worksheets/sheet1.xml");
  const cells = new Map(
    sheet
      .filter(({ name }) => name === "c")
      .map(({ attributes, text }) => {
        const value = attributes["t"] === "s" ? strings[Number(text)] : text;
        return [attributes["r"] ?? "", { type: attributes["t"], value }] as const;
      }),
  );
  return { sheet, cells, workbook: read("xl/workbook.xml"), core: read("docProps/core.xml") };
}

type Unpacked = Awaited<ReturnType<typeof unpacked>>;
const attributesOf = (list: Unpacked["sheet"], wanted: string) =>
  list.find(({ name }) => name === wanted)?.attributes ?? expect.fail(`no ${wanted}`);

describe("the .xlsx", () => {
  let file: Unpacked;
  beforeAll(async () => {
    file = await unpacked("A4");
  });
  const column = (letter: string) =>
    [...file.cells].filter(([ref]) => ref.startsWith(letter)).map(([, cell]) => cell.value);

  test("has a header, what changed, one row per block, and the rest", () => {
    const rows = new Map<string, string[]>();
    for (const [ref, { value }] of file.cells) {
      const row = ref.replace(/^[A-Z]+/, "");
      if (value) rows.set(row, [...(rows.get(row) ?? []), value]);
    }
    expect([...rows.values()]).toEqual([
      ["The Tidewatcher"],
      ["Tuesday 6 April 2027"],
      ["Lantern Street Theatre"],
      ["Issue 2, sent Monday 5 April 2027, 16:40, replaces the one of 12:05"],
      ["Changed", "The Ness Light moves from 18:30 to 20:55"],
      ["Teodor Lindqvist-Amara is called at 20:15, not 18:30"],
      ["When", "What", "Bars", "Who", "Where", "Pianist"],
      [
        "18:30–18:55",
        "13 Bet’s Ledger\nmusic, all",
        "Sabela Roque, Ciarán Obuya",
        "Room 2",
        "Osric Dlamini",
      ],
      [
        "18:55–19:15",
        "7 What the Gulls Know",
        "20–84",
        "Wren Tallis, Sabela Roque",
        "Room 2",
        "Osric Dlamini",
      ],
      ["19:15–19:30", "Break"],
      [
        "19:30–19:55",
        "=1+1\n@home, then\n-2 steps",
        "+44 Chorus, Wren Tallis",
        '=HYPERLINK("http://x.example")',
        "-Osric",
      ],
      ["Released", "Sabela Roque 19:15"],
      ["Wren Tallis 19:55"],
      ["Music", "Hanne Briscoe leads"],
      ["Osric Dlamini at the piano, rests 19:15"],
      ["Tomorrow", "Wednesday 7 April, 18:30, staging, Hall"],
      ["Away", "Junia Vale (agreed)"],
      ["Notes", "Bring your own book & a pencil. Doors 18:00."],
      ["Contact", "Late? Stage manager 0000 555 014"],
    ]);
  });

  test("no cell is a formula: all are shared strings, whatever they begin with", () => {
    const filled = [...file.cells.values()].filter(({ value }) => value);
    expect(filled.map(({ type }) => type)).toEqual(filled.map(() => "s"));
    expect(file.sheet.filter(({ name }) => name === "f")).toEqual([]);
    expect(column("B")).toContain("=1+1\n@home, then\n-2 steps");
    expect(column("F")).toContain("-Osric");
  });

  // Source: ECMA-376 Part 1, 18.3.1.63 pageSetup: paperSize 1 is Letter, 9 is A4; fitToHeight 0 is as many as needed.
  test.each([
    ["A4", "9"],
    ["Letter", "1"],
  ] as const)("prints on %s, landscape, one page wide", async (paper, code) => {
    const { sheet } = await unpacked(paper);
    expect(attributesOf(sheet, "pageSetup")).toMatchObject({
      paperSize: code,
      orientation: "landscape",
      fitToWidth: "1",
      fitToHeight: "0",
    });
    expect(attributesOf(sheet, "pageSetUpPr")).toMatchObject({ fitToPage: "1" });
    expect(Number(attributesOf(sheet, "pageMargins")["left"])).toBeGreaterThanOrEqual(0.25);
  });

  test("the headings repeat on every page, and pages are numbered", () => {
    const titles = file.workbook.find(({ name }) => name === "definedName");
    expect(titles?.attributes["name"]).toBe("_xlnm.Print_Titles");
    const row = [...file.cells].find(([, { value }]) => value === "When")?.[0].slice(1) ?? "";
    expect(titles?.text).toBe(`'Call sheet'!$${row}:$${row}`);
    const footer = file.sheet.find(({ name }) => name === "oddFooter")?.text;
    expect(footer).toBe("&LThe Tidewatcher, Tuesday 6 April 2027&CIssue 2&RPage &P of &N");
  });

  test("an ampersand in a title is printed, not obeyed", async () => {
    const parts = unzipSync(
      await writeCallSheet({ ...drawnCallSheet, productionTitle: "Salt & Tide" }, "A4"),
    );
    const sheet = elements(strFromU8(parts["xl/worksheets/sheet1.xml"] ?? new Uint8Array()));
    expect(sheet.find(({ name }) => name === "oddFooter")?.text).toContain("&LSalt && Tide,");
  });
});

/** A CSV reader that knows nothing of ours: RFC 4180, one character at a time. */
function readCsv(text: string): string[][] {
  const rows: string[][] = [[]];
  let cell = "";
  let quoted = false;
  const characters = Array.from(text);
  for (let at = 0; at < characters.length; at += 1) {
    const character = characters[at] ?? "";
    if (quoted) {
      if (character === '"' && characters[at + 1] === '"') {
        cell += '"';
        at += 1;
      } else if (character === '"') quoted = false;
      else cell += character;
    } else if (character === '"') quoted = true;
    else if (character === "," || character === "\n") {
      rows.at(-1)?.push(cell);
      cell = "";
      if (character === "\n") rows.push([]);
    } else if (character !== "\r") cell += character;
  }
  rows.pop();
  return rows;
}

describe("the CSV", () => {
  const text = writeCallSheetCsv(drawnCallSheet);
  const rows = readCsv(text.slice(1));

  test("begins with a byte order mark and holds every block", () => {
    expect(text.charCodeAt(0)).toBe(0xfeff);
    expect(rows).toContainEqual([
      "18:55–19:15",
      "7 What the Gulls Know",
      "20–84",
      "Wren Tallis, Sabela Roque",
      "Room 2",
      "Osric Dlamini",
    ]);
    expect(rows.at(-1)).toEqual(["Contact", "Late? Stage manager 0000 555 014"]);
  });

  // Source: OWASP ASVS 5.0.0, 1.2.10: a single quote before = + - @ tab and NUL.
  test("no cell begins as a formula", () => {
    expect(rows.flat().filter((cell) => /^[=+\-@\t\r\0]/.test(cell))).toEqual([]);
    expect(rows).toContainEqual([
      "19:30–19:55",
      "'=1+1\n@home, then\n-2 steps",
      "",
      "'+44 Chorus, Wren Tallis",
      `'=HYPERLINK("http://x.example")`,
      "'-Osric",
    ]);
  });

  test.each(["\t=1", " =1", "\n+1", "＝1", "\0x"])(
    "a hidden beginning (case %#) is guarded too",
    (title) => {
      const csv = writeCallSheetCsv({ ...drawnCallSheet, productionTitle: title });
      expect(readCsv(csv.slice(1))[0]).toEqual([`'${title}`]);
    },
  );
});

// LibreOffice is a reader that no one here wrote; where it is not installed the XML above is the check.
if (existsSync("/usr/bin/soffice")) {
  test("LibreOffice shows the same texts", { timeout: 120_000 }, async () => {
    const folder = mkdtempSync(path.join(tmpdir(), "call-sheet-"));
    try {
      writeFileSync(path.join(folder, "sheet.xlsx"), await writeCallSheet(drawnCallSheet, "A4"));
      const profile = `-env:UserInstallation=file://${folder}/profile`;
      const asUtf8Csv = "csv:Text - txt - csv (StarCalc):44,34,76,1,,0,false,true,false";
      execFileSync(
        "/usr/bin/soffice",
        [
          profile,
          "--headless",
          "--convert-to",
          asUtf8Csv,
          "--outdir",
          folder,
          path.join(folder, "sheet.xlsx"),
        ],
        { stdio: "pipe", timeout: 100_000 },
      );
      const shown = readCsv(readFileSync(path.join(folder, "sheet.csv"), "utf8"));
      const texts = (rows: string[][]) =>
        rows.map((row) => row.filter(Boolean)).filter((row) => row.length > 0);
      const unguarded = readCsv(writeCallSheetCsv(drawnCallSheet).slice(1)).map((row) =>
        row.map((cell) => cell.replace(/^'/, "")),
      );
      expect(texts(shown)).toEqual(texts(unguarded));
    } finally {
      rmSync(folder, { recursive: true, force: true });
    }
  });
}
