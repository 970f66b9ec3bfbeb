import { readdirSync, readFileSync } from "node:fs";
import path from "node:path";
import { setting } from "./demo-season";
import { until } from "./until";

export type Letter = { id: string; to: string[]; subject: string; text: string };

/** The local mailbox, read as its owners would: a letter that was opened is not opened a second time. */
export class Mailbox {
  private readonly folder = setting("E2E_MAIL_DIR");
  /** What lay there before, and what was opened since. */
  private readonly opened = new Set(this.names());

  private names(): string[] {
    return readdirSync(this.folder).filter((name) => name.endsWith(".json"));
  }

  private unopened(): { name: string; letter: Letter }[] {
    return this.names()
      .filter((name) => !this.opened.has(name))
      .toSorted()
      .map((name) => ({
        name,
        letter: JSON.parse(readFileSync(path.join(this.folder, name), "utf8")) as Letter,
      }));
  }

  /** The letters to an address that lie there unopened. */
  waiting(address: string): Letter[] {
    return this.unopened().flatMap(({ letter }) => (letter.to.includes(address) ? [letter] : []));
  }

  /** Waits for a letter to the address whose subject fits, and opens it. */
  async letter(address: string, subject: RegExp): Promise<Letter> {
    const found = await until(
      () =>
        this.unopened().find(
          ({ letter }) => letter.to.includes(address) && subject.test(letter.subject),
        ),
      { what: `a letter to ${address} about ${String(subject)}` },
    );
    this.opened.add(found.name);
    return found.letter;
  }

  /** The link in a letter that is waited for. */
  async link(address: string, subject: RegExp): Promise<string> {
    const { text } = await this.letter(address, subject);
    const link = /https?:\/\/\S+/.exec(text)?.[0];
    if (link === undefined) throw new Error(`No link in the letter to ${address}: ${text}`);
    return link;
  }
}
