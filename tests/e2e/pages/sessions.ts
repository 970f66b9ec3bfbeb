import type { Page } from "playwright-core";
import { visit } from "./visit";

/** An accompanist's sessions, in the order of the page, each as the words it shows when it is folded out. */
export async function sessionsOf(page: Page): Promise<string[]> {
  await visit(page, "/me/sessions");
  await page.getByRole("heading", { name: "My sessions" }).waitFor();
  const cards = page.getByRole("article");
  for (const card of await cards.all()) {
    const music = card.getByText(/^\d+ pieces?$/);
    if ((await music.count()) > 0 && !(await card.getByRole("list").isVisible()))
      await music.click();
  }
  return (await cards.allInnerTexts()).map((text) => text.replaceAll(/\s+/g, " "));
}
