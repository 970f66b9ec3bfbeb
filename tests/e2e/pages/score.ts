import type { Locator, Page } from "playwright-core";
import { visit } from "./visit";

/** The score of a production: numbers down, roles across. */
export class ScorePage {
  private readonly page: Page;
  private readonly dialog: Locator;
  private readonly side: Locator;
  private readonly table: Locator;

  constructor(page: Page) {
    this.page = page;
    this.dialog = page.getByRole("dialog");
    this.side = page.getByRole("complementary", { name: "What is selected" });
    this.table = page.getByRole("table", { name: /^What each role sings/ });
  }

  async open(production: string): Promise<void> {
    await visit(this.page, `${production}/score`);
  }

  /** Sends a file; what it would change is shown next. */
  async read(file: string): Promise<ReadingPage> {
    await this.page.getByRole("button", { name: "Read a score (MusicXML)" }).click();
    await this.dialog.getByLabel("File").setInputFiles(file);
    await this.dialog.getByRole("button", { name: "Read it" }).click();
    await this.page.getByRole("button", { name: "Put it in" }).waitFor();
    return new ReadingPage(this.page);
  }

  async addRole(name: string): Promise<void> {
    await this.page.getByRole("button", { name: "Add a role" }).click();
    await this.dialog.getByLabel("Name").fill(name);
    await this.dialog.getByRole("button", { name: "Add the role" }).click();
    await this.table.getByRole("columnheader", { name }).waitFor();
  }

  async addNumber(label: string, title: string, length: string): Promise<void> {
    await this.page.getByRole("button", { name: "Add a number" }).click();
    await this.dialog.getByLabel("Number").fill(label);
    await this.dialog.getByLabel("Title").fill(title);
    await this.dialog.getByLabel("Length").fill(length);
    await this.dialog.getByRole("button", { name: "Add the number" }).click();
    await this.table.getByRole("rowheader", { name: `${label} ${title}` }).waitFor();
  }

  async typeLine(role: string, title: string, low: string, high: string): Promise<void> {
    await this.page.getByRole("link", { name: `Type what ${role} sings in ${title}` }).click();
    await this.side.getByRole("heading", { name: role }).first().waitFor();
    await this.side.getByText(title).first().waitFor();
    await this.side.getByRole("textbox", { name: "Lowest note" }).fill(low);
    await this.side.getByRole("textbox", { name: "Highest note" }).fill(high);
    await this.side.getByRole("button", { name: "Type the line in" }).click();
    await this.line(role, title).waitFor();
  }

  /** What a role sings in a number, as its cell says it. */
  line(role: string, title: string): Locator {
    return this.table.getByRole("link", { name: `${role} in ${title}:` });
  }

  roles(): Promise<string[]> {
    return this.table
      .getByRole("columnheader")
      .allInnerTexts()
      .then((heads) => heads.slice(3).map((head) => head.trim()));
  }
}

/** A score that was read: what its parts sing, before anything changes. */
export class ReadingPage {
  private readonly page: Page;

  constructor(page: Page) {
    this.page = page;
  }

  private part(name: string): Locator {
    return this.page
      .getByRole("region", { name: "The parts" })
      .getByRole("listitem")
      .filter({ has: this.page.getByRole("heading", { name, exact: true }) });
  }

  /** "G♯2 to D4, mostly E3 to A3." */
  range(name: string): Promise<string> {
    return this.part(name).getByRole("paragraph").first().innerText();
  }

  /** What the drawing of the part says to those who do not see it. */
  drawing(name: string): Promise<string | null> {
    return this.part(name).getByRole("img").getAttribute("aria-label");
  }

  becomes(name: string): Promise<string> {
    return this.part(name).getByLabel(`${name} becomes`).locator("option:checked").innerText();
  }

  /** Whether the page points out that a part looks an octave high. */
  looksHigh(name: string): Promise<boolean> {
    return this.part(name).getByText(`${name} looks an octave high.`).isVisible();
  }

  async takeDown(name: string): Promise<void> {
    await this.part(name).getByRole("button", { name: "Put it an octave down" }).click();
    await this.part(name).getByText("An octave below where it is written.").waitFor();
  }

  changes(): Promise<string[]> {
    return this.page
      .getByRole("complementary", { name: "What changes" })
      .getByRole("listitem")
      .allInnerTexts();
  }

  async putIn(): Promise<void> {
    await this.page.getByRole("button", { name: "Put it in" }).click();
    await this.page.waitForURL(/\/score\?number=/);
    await this.page.getByRole("table", { name: /^What each role sings/ }).waitFor();
  }
}
