import type { Page } from "playwright-core";
import { visit } from "./visit";

/** The sheet of a day, before and after it is issued. */
export class SheetPage {
  private readonly page: Page;

  constructor(page: Page) {
    this.page = page;
  }

  async open(production: string, day: string): Promise<void> {
    await visit(this.page, `${production}/call-sheets`);
    await this.page.getByRole("link", { name: day }).first().click();
    await this.page.getByRole("heading", { level: 1, name: day }).waitFor();
  }

  /** The blocks as they will be printed: when, what, who, where. */
  async blocks(): Promise<string[][]> {
    const rows = this.page.getByRole("table", { name: /^Who is called when/ }).getByRole("row");
    const cells: string[][] = [];
    for (const row of (await rows.all()).slice(1)) {
      const texts = await row.getByRole("cell").allInnerTexts();
      cells.push(texts.map((text) => text.replaceAll(/\s+/g, " ").trim()));
    }
    return cells;
  }

  paper(): Promise<string> {
    return this.page.getByRole("article").innerText();
  }

  /** Issues the sheet with notes. Returns the issue's address. */
  async issue(notes: string): Promise<string> {
    await this.page.getByLabel("Notes for everyone").fill(notes);
    await this.page.getByRole("button", { name: "Issue 1" }).click();
    await this.page.waitForURL(/\/call-sheets\/issues\/[0-9a-f-]{36}/);
    await this.page.getByRole("button", { name: "Print" }).waitFor();
    return new URL(this.page.url()).pathname;
  }

  /** The address of a file of the issue. */
  async fileAddress(name: RegExp): Promise<string> {
    return (await this.page.getByRole("link", { name }).getAttribute("href")) ?? "";
  }

  /** Downloads a file of the issue as a person would. Returns its name and where it lies. */
  async download(name: RegExp): Promise<{ name: string; path: string }> {
    const coming = this.page.waitForEvent("download");
    await this.page.getByRole("link", { name }).click();
    const file = await coming;
    return { name: file.suggestedFilename(), path: await file.path() };
  }

  /** What a printer would get: the words on the paper, and the pages. */
  async print(): Promise<{ words: string; pages: Buffer }> {
    await this.page.emulateMedia({ media: "print" });
    const words = await this.page.locator("body").innerText();
    const pages = await this.page.pdf({ preferCSSPageSize: true });
    await this.page.emulateMedia({ media: null });
    return { words, pages };
  }
}
