import type { Locator, Page } from "playwright-core";
import { keyRange } from "./range-keyboard";
import { told, visit } from "./visit";

/** The list of who comes back for what. */
export class CallbacksPage {
  private readonly page: Page;
  private readonly side: Locator;

  constructor(page: Page) {
    this.page = page;
    this.side = page.getByRole("complementary", { name: "When and where, and the answers" });
  }

  async open(production: string): Promise<void> {
    await visit(this.page, `${production}/callbacks`);
  }

  async beginRound(): Promise<void> {
    await this.page.getByRole("button", { name: "Begin the round" }).click();
    await this.page.getByRole("grid").waitFor();
  }

  row(singer: string): Locator {
    return this.page.getByRole("row", { name: new RegExp(`^${singer}`) });
  }

  /** Writes the range heard from a singer, by the arrow keys. */
  async hear(singer: string, low: string, high: string): Promise<void> {
    await this.page.getByRole("button", { name: `Write the range heard from ${singer}` }).click();
    const form = this.page.getByRole("dialog");
    await keyRange(
      form.getByRole("group", { name: "Lowest to highest note heard" }).last(),
      low,
      high,
    );
    await form.getByRole("button", { name: "Write it down" }).click();
    await told(this.page, `The range heard from ${singer} is written down.`);
    await this.row(singer).getByText("heard").first().waitFor();
  }

  /** What the cell of a singer and a role says of the range. */
  verdict(singer: string, role: string): Promise<string> {
    return this.page.getByRole("gridcell", { name: `${singer} for ${role}` }).innerText();
  }

  async mark(singer: string, role: string): Promise<void> {
    const box = { name: `${singer} for ${role}`, exact: true };
    // The box is ticked at once; it is kept when the answer is there.
    const kept = this.page.waitForResponse((answer) => answer.request().method() === "POST");
    await this.page.getByRole("checkbox", box).click();
    await this.page.getByRole("checkbox", { ...box, checked: true }).waitFor();
    await kept;
  }

  async sayWhen(round: {
    date: string;
    from: string;
    to: string;
    room: string;
    prepare: string;
  }): Promise<void> {
    await this.side.getByLabel("Day").fill(round.date);
    await this.side.getByLabel("From").fill(round.from);
    await this.side.getByLabel("To", { exact: true }).fill(round.to);
    await this.side.getByLabel("Room").selectOption({ label: round.room });
    await this.side.getByLabel("What to prepare").fill(round.prepare);
    await this.side.getByRole("button", { name: "Save when and where" }).click();
    await told(this.page, "Saved. Nothing has gone out.");
  }

  /** Publishes the list. Returns what is said before. */
  async publish(): Promise<string> {
    await this.page.getByRole("button", { name: "Publish the list" }).click();
    const question = this.page.getByRole("alertdialog");
    const said = await question.innerText();
    await question.getByRole("button", { name: "Publish" }).click();
    await told(this.page, /^Published\./);
    return said;
  }
}
