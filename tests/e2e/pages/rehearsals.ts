import type { Locator, Page } from "playwright-core";
import { told, visit } from "./visit";

export type CallAsked = {
  date: string;
  starts: string;
  room: string;
  leads: string;
  pianist: string;
  /** "1 The Long Day Closes", in the order wanted. */
  numbers: string[];
};

/** The form in which a call is made; clashes show beside it while it is filled in. */
export class CallForm {
  private readonly page: Page;
  private readonly side: Locator;
  private readonly clashes: Locator;

  constructor(page: Page) {
    this.page = page;
    this.side = page.getByRole("complementary", { name: "What follows from it" });
    this.clashes = this.side.getByRole("region", { name: "Clashes" }).getByRole("listitem");
  }

  async fill(production: string, asked: CallAsked): Promise<void> {
    await visit(this.page, `${production}/rehearsals`);
    await this.page.getByRole("link", { name: "Make a call" }).first().click();
    await this.page.getByLabel("Kind").selectOption({ label: "Music call" });
    await this.page.getByLabel("Day", { exact: true }).fill(asked.date);
    await this.page.getByLabel("Starts").fill(asked.starts);
    await this.page.getByLabel("Room", { exact: true }).selectOption({ label: asked.room });
    await this.lead(asked.leads);
    await this.page.getByLabel("At the piano").selectOption({ label: asked.pianist });
    for (const number of asked.numbers) {
      await this.page.getByLabel("Number", { exact: true }).selectOption({ label: number });
      await this.page.getByRole("button", { name: "Add the number" }).click();
    }
  }

  async lead(name: string): Promise<void> {
    await this.page.getByLabel("Leads", { exact: true }).selectOption({ label: name });
  }

  /** The status beside the form: "4 clashes. …", "No clashes. …". */
  status(): Promise<string> {
    return this.side.getByRole("status").innerText();
  }

  /** The clash that names all of these words: its text and what is offered against it. */
  async clash(...words: string[]): Promise<{ text: string; offers: string[] }> {
    const row = words.reduce((rows, word) => rows.filter({ hasText: word }), this.clashes);
    await row.waitFor();
    return {
      text: (await row.getByRole("paragraph").innerText()).replaceAll(/\s+/g, " "),
      offers: await row.getByRole("button").allInnerTexts(),
    };
  }

  async accept(offer: string): Promise<void> {
    await this.side.getByRole("button", { name: offer }).click();
  }

  /** Who is called to a block, as its row says it. */
  calledTo(title: string): Promise<string> {
    return this.page
      .getByRole("region", { name: "Blocks" })
      .getByRole("listitem")
      .filter({ has: this.page.getByRole("button", { name: `Take ${title} out` }) })
      .getByText(/called:/)
      .innerText();
  }

  /** Saves the draft. Returns the call's address. */
  async save(): Promise<string> {
    await this.page.getByRole("button", { name: "Save the draft" }).click();
    await this.page.waitForURL(/\/rehearsals\/[0-9a-f-]{36}$/);
    return new URL(this.page.url()).pathname;
  }
}

/** One call. */
export class CallPage {
  private readonly page: Page;

  constructor(page: Page) {
    this.page = page;
  }

  words(): Promise<string> {
    return this.page.getByRole("main").innerText();
  }

  async publish(): Promise<void> {
    await this.page.getByRole("button", { name: "Publish the call" }).click();
    await told(this.page, "Published: the room and the pianist are taken.");
  }
}
