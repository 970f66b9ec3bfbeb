import type { Locator, Page } from "playwright-core";
import { told, visit } from "./visit";

/** The casting grid: singers down, roles across. */
export class CastingPage {
  private readonly page: Page;
  private readonly grid: Locator;
  readonly side: Locator;

  constructor(page: Page) {
    this.page = page;
    this.grid = page.getByRole("grid", { name: /^Singers against roles/ });
    this.side = page.getByRole("complementary", { name: "The cell that is open, and covers" });
  }

  async open(production: string): Promise<void> {
    await visit(this.page, `${production}/casting`);
    await this.grid.waitFor();
  }

  async singers(): Promise<string[]> {
    const heads = await this.grid.getByRole("rowheader").allInnerTexts();
    return heads.map((head) => head.split("\n")[0]?.trim() ?? "");
  }

  private async cell(singer: string, role: string): Promise<Locator> {
    const heads = await this.grid.getByRole("columnheader").allInnerTexts();
    const column = heads.findIndex((head) => head.startsWith(role)) - 1;
    return this.grid
      .getByRole("row", { name: new RegExp(`^${singer}`) })
      .getByRole("gridcell")
      .nth(column);
  }

  /** What a cell says: the verdict in words, and what is drawn. */
  async words(singer: string, role: string): Promise<{ text: string; drawing: string | null }> {
    const cell = await this.cell(singer, role);
    return {
      text: await cell.innerText(),
      drawing: await cell.getByRole("img").getAttribute("aria-label"),
    };
  }

  /** Opens a cell beside the grid. */
  async look(singer: string, role: string): Promise<void> {
    await (await this.cell(singer, role)).click();
    await this.side.getByRole("heading", { name: `${singer} as ${role}` }).waitFor();
  }

  choice(name: "Cast" | "Consider" | "Cover"): Locator {
    return this.side.getByRole("button", { name, exact: true });
  }

  async cast(singer: string, role: string): Promise<void> {
    await this.look(singer, role);
    await this.choice("Cast").click();
    await told(this.page, `${singer} as ${role}: cast.`);
  }

  /** Whether a singer's cell says that the role is theirs. */
  async says(singer: string, role: string, words: string): Promise<boolean> {
    return (await (await this.cell(singer, role)).innerText()).includes(words);
  }
}
