import type { Locator, Page } from "playwright-core";
import { told, visit } from "./visit";

/** What is asked for an audition day; times as they are typed. */
export type DayAsked = {
  date: string;
  rooms: { name: string; opens: string; closes: string }[];
  slotMinutes: string;
};

/** Makes an audition day. Returns its address. */
export async function makeDay(page: Page, production: string, asked: DayAsked): Promise<string> {
  await visit(page, `${production}/auditions`);
  await page.getByRole("link", { name: "Make an audition day" }).first().click();
  await page.getByLabel("Day", { exact: true }).fill(asked.date);
  for (const room of asked.rooms) {
    await page.getByRole("checkbox", { name: new RegExp(`^${room.name},`) }).check();
    await page.getByLabel(`${room.name} opens`).fill(room.opens);
    await page.getByLabel(`${room.name} closes`).fill(room.closes);
  }
  await page.getByLabel("Minutes a slot").fill(asked.slotMinutes);
  await page.getByRole("button", { name: "Make the day" }).click();
  await page.waitForURL(/\/auditions\/[0-9a-f-]{36}$/);
  return new URL(page.url()).pathname;
}

/** A file by its path, or as it is. */
type SheetFile = string | { name: string; mimeType: string; buffer: Buffer };

/** Singers brought in from a spreadsheet: what each row becomes, and what is wrong with the others. */
export class ImportPage {
  private readonly page: Page;
  private readonly rows: Locator;

  constructor(page: Page) {
    this.page = page;
    this.rows = page.getByRole("table", { name: "What each row becomes" }).getByRole("row");
  }

  async choose(production: string, file: SheetFile): Promise<void> {
    await visit(this.page, `${production}/auditions/import`);
    await this.page.getByLabel("Spreadsheet, .xlsx or .csv").setInputFiles(file);
    await this.rows.first().waitFor();
  }

  /** All that the preview says, a text a row. */
  async preview(): Promise<string[]> {
    return (await this.rows.allInnerTexts()).slice(1).map((text) => text.replaceAll(/\s+/g, " "));
  }

  /** The rows that are left out, by their line in the sheet, with the reasons. */
  async leftOut(): Promise<Record<string, string[]>> {
    const found: Record<string, string[]> = {};
    for (const row of await this.rows.filter({ hasText: "left out" }).all()) {
      const line = await row.getByRole("cell").first().innerText();
      found[line] = await row.getByRole("paragraph").allInnerTexts();
    }
    return found;
  }

  async signUp(): Promise<void> {
    await this.page.getByRole("button", { name: /^Sign up \d+ singers?$/ }).click();
    await told(this.page, /\d+ singers? signed up/);
  }
}

/** One audition day: rooms as columns of slots. */
export class DayPage {
  private readonly page: Page;
  private readonly dialog: Locator;

  constructor(page: Page) {
    this.page = page;
    this.dialog = page.getByRole("dialog");
  }

  async open(address: string): Promise<void> {
    await visit(this.page, address);
    await this.page.getByRole("region", { name: "Plan the day" }).waitFor();
  }

  /** The slot at a time in a room, free or not. */
  slot(time: string, room: string): Locator {
    return this.page.getByRole("button", { name: `${time} ${room}, ` });
  }

  /** The slot in which a singer stands. */
  slotOf(singer: string): Locator {
    return this.page.getByRole("button", { name: new RegExp(`^\\d\\d:\\d\\d [^,]+, ${singer}, `) });
  }

  /** "10:56 Room 1", where a singer stands. */
  async placeOf(singer: string): Promise<string> {
    const label = await this.slotOf(singer).getAttribute("aria-label");
    return String(label).split(",")[0] ?? "";
  }

  /** Whether a time in a room is free. */
  async isFree(time: string, room: string): Promise<boolean> {
    return (await this.slot(time, room).getAttribute("aria-label"))?.endsWith(", free") ?? false;
  }

  slots(room: string): Promise<string[]> {
    return this.page
      .getByRole("region", { name: room, exact: true })
      .getByRole("button", { name: new RegExp(`^\\d\\d:\\d\\d ${room}`) })
      .evaluateAll((all) => all.map((slot) => slot.getAttribute("aria-label") ?? ""));
  }

  /** What stands in a room's column besides slots: lunch and rests. */
  rests(room: string): Promise<string[]> {
    return this.page
      .getByRole("region", { name: room, exact: true })
      .getByRole("paragraph")
      .filter({ hasText: /^(Lunch|Pianist rests)/ })
      .allInnerTexts();
  }

  async placeEveryone(): Promise<void> {
    await this.page.getByRole("button", { name: "Place everyone" }).click();
    await this.dialog.getByRole("button", { name: /^Place \d+ singers?$/ }).click();
    await this.dialog.waitFor({ state: "hidden" });
  }

  /** Moves a singer without touching a mouse: Enter, so many times an arrow, Enter. */
  async moveByKeyboard(singer: string, arrows: string[]): Promise<void> {
    await this.slotOf(singer).focus();
    await this.page.keyboard.press("Enter");
    await told(this.page, `${singer} picked up.`);
    for (const arrow of arrows) await this.page.keyboard.press(arrow);
    await this.page.keyboard.press("Enter");
    await told(this.page, `${singer} sings at `);
  }

  async drag(singer: string, time: string, room: string): Promise<void> {
    await this.slotOf(singer).dragTo(this.slot(time, room));
    await told(this.page, `${singer} sings at ${time}, ${room}.`);
  }

  /** Presses one singer and then another: they change places. */
  async swap(one: string, other: string): Promise<void> {
    await this.slotOf(one).click();
    await this.slotOf(other).click();
    await told(this.page, `${one} and ${other} changed places.`);
  }

  /** Presses a singer and then a slot. What comes of it is for the caller to see. */
  async press(singer: string, time: string, room: string): Promise<void> {
    await this.slotOf(singer).click();
    await this.slot(time, room).click();
  }

  /** Opens the form in which a pianist is given to a room, and sends it. It stays open when it is refused. */
  async askForPianist(name: string, room: string, from: string, to: string): Promise<void> {
    if (!(await this.dialog.isVisible()))
      await this.page.getByRole("button", { name: "Assign a pianist" }).click();
    await this.dialog.getByLabel("Pianist").selectOption({ label: name });
    await this.dialog.getByLabel("Room").selectOption({ label: room });
    await this.dialog.getByLabel("From").fill(from);
    await this.dialog.getByLabel("To").fill(to);
    await this.dialog.getByRole("button", { name: "Assign" }).click();
  }

  async assignPianist(name: string, room: string, from: string, to: string): Promise<void> {
    await this.askForPianist(name, room, from, to);
    await this.dialog.waitFor({ state: "hidden" });
    await this.page
      .getByRole("button", { name: `Take ${name} out of ${room}, ${from}–${to}` })
      .waitFor();
  }

  /** Waits until the form in front says why it was refused. */
  async refused(reason: RegExp): Promise<string> {
    const words = this.dialog.getByText(reason).first();
    await words.waitFor();
    return words.innerText();
  }

  /** Invites everyone who stands on the day. Returns what the first of them will read. */
  async inviteEveryone(): Promise<string> {
    await this.page.getByRole("button", { name: /^Invite \d+$/ }).click();
    const read = await this.dialog.getByRole("region", { name: "What they read" }).innerText();
    await this.dialog.getByRole("button", { name: /^Invite \d+ singers?$/ }).click();
    await told(this.page, /^\d+ singers? invited\.$/);
    return read;
  }
}
