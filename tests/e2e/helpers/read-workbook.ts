import { readFileSync } from "node:fs";
import { strFromU8, unzipSync } from "fflate";

export type Workbook = {
  /** Every row of the first sheet as its cells' texts; an empty cell is "". */
  rows: string[][];
  formulas: number;
  /** The sheet's paper by its number in ECMA-376 Part 1, 18.3.1.63: 9 is A4, 1 is Letter. */
  paper: string | undefined;
  landscape: boolean;
};

const ENTITIES: Record<string, string> = { amp: "&", lt: "<", gt: ">", quot: '"', apos: "'" };
const plain = (xml: string): string =>
  xml.replaceAll(/&(#?\w+);/g, (whole, name: string) =>
    name.startsWith("#") ? String.fromCodePoint(Number(name.slice(1))) : (ENTITIES[name] ?? whole),
  );
const texts = (xml: string): string =>
  [...xml.matchAll(/<t(?: [^>]*)?>([^<]*)<\/t>/g)].map(([, text]) => plain(text ?? "")).join("");
/** The column of a cell from its address: 0 for "A1". The sheet has no more than 26 columns. */
const columnOf = (address: string): number => address.charCodeAt(0) - "A".charCodeAt(0);

/**
 * Reads a workbook from its parts (ECMA-376 Part 1, 18.3 and 18.4) without the library that wrote it: the archive's
 * shared strings and the first sheet.
 */
export function readWorkbook(file: string): Workbook {
  const parts = unzipSync(new Uint8Array(readFileSync(file)));
  const part = (name: string): string => (parts[name] ? strFromU8(parts[name]) : "");
  const sheet = part("xl/worksheets/sheet1.xml");
  const shared = [...part("xl/sharedStrings.xml").matchAll(/<si>(.*?)<\/si>/gs)].map(([, item]) =>
    texts(item ?? ""),
  );
  const rows = [...sheet.matchAll(/<row [^>]*?(?:\/>|>(.*?)<\/row>)/gs)].map(([, cells]) => {
    const row: string[] = [];
    for (const [, head = "", body = ""] of (cells ?? "").matchAll(
      /<c ([^>]*?)(?:\/>|>(.*?)<\/c>)/gs,
    )) {
      const value = /<v>([^<]*)<\/v>/.exec(body)?.[1] ?? "";
      const isShared = /\bt="s"/.test(head);
      row[columnOf(/\br="([A-Z]+\d+)"/.exec(head)?.[1] ?? "A1")] = isShared
        ? (shared[Number(value)] ?? "")
        : texts(body) || plain(value);
    }
    return Array.from(row, (cell) => cell ?? "");
  });
  return {
    rows,
    formulas: [...sheet.matchAll(/<f[ >/]/g)].length,
    paper: /<pageSetup[^>]*\bpaperSize="(\d+)"/.exec(sheet)?.[1],
    landscape: /<pageSetup[^>]*\borientation="landscape"/.test(sheet),
  };
}
