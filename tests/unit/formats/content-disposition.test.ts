import { describe, expect, test } from "vitest";
import { contentDisposition } from "@/lib/formats/content-disposition";

describe("the name a file is saved under", () => {
  // The encoded form is that of RFC 8187, section 3.2.3: "£ rates" is UTF-8''%c2%a3%20rates.
  test("is given in plain letters and in full", () => {
    expect(contentDisposition("£ rates")).toBe(
      `attachment; filename="_ rates"; filename*=UTF-8''%C2%A3%20rates`,
    );
    expect(contentDisposition("Bet’s Ledger.csv")).toContain(`filename="Bet's Ledger.csv"`);
  });

  test("cannot end the header or leave the folder", () => {
    const header = contentDisposition('a"\r\nset-cookie: x=1; /../b.xlsx');
    expect(header).not.toMatch(/[\r\n]/);
    expect(header).toContain('filename="a set-cookie x=1; .. b.xlsx"');
    expect(contentDisposition("///")).toContain('filename="file"');
  });
});
