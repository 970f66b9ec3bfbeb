import type { Locator, Page } from "playwright-core";
import { tapRange } from "./range-keyboard";
import { told, visit } from "./visit";

/** A singer's own pages, on a phone. */
export class OwnPage {
  private readonly page: Page;

  constructor(page: Page) {
    this.page = page;
  }

  async open(): Promise<void> {
    await visit(this.page, "/me");
    await this.page.getByRole("heading", { level: 1 }).waitFor();
  }

  /** Everything the page says. */
  words(): Promise<string> {
    return this.page.getByRole("main").innerText();
  }

  /** What needs an answer now: "Your audition", "You’re called back". */
  decision(heading: string): Locator {
    return this.page.getByRole("region", { name: heading });
  }

  async sayYes(): Promise<void> {
    await this.page.getByRole("button", { name: "I’ll be there" }).tap();
    await told(this.page, "Nothing needs your answer.");
  }

  /** What is coming up, an entry each. */
  comingUp(): Promise<string[]> {
    return this.page
      .getByRole("region", { name: "Coming up" })
      .getByRole("listitem")
      .allInnerTexts()
      .then((all) => all.map((text) => text.replaceAll(/\s+/g, " ")));
  }

  async giveRange(low: string, high: string): Promise<void> {
    await visit(this.page, "/me/range");
    await tapRange(this.page.getByRole("group", { name: "What you sing" }).last(), low, high);
    await this.page.getByRole("button", { name: "Put it on file" }).tap();
    await this.page.waitForURL(/\/me$/);
    await this.page.getByText(`${low}–${high}. As given on`).waitFor();
  }

  async cannotCome(date: string, reason: string): Promise<void> {
    await visit(this.page, "/me/conflicts");
    await this.page.getByLabel("Day", { exact: true }).fill(date);
    await this.page.getByLabel("Reason").fill(reason);
    await this.page.getByRole("button", { name: "Tell them" }).tap();
    await told(this.page, "They have been told.");
  }

  /** The dates on which they cannot come. */
  dates(): Promise<string[]> {
    return this.page
      .getByRole("main")
      .getByRole("listitem")
      .filter({ has: this.page.getByRole("button", { name: /^Take back/ }) })
      .allInnerTexts();
  }
}
