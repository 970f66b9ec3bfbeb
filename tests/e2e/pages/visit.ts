import type { Page } from "playwright-core";

/** Opens an address and waits until the page is awake: nothing is being fetched any more. */
export async function visit(page: Page, address: string): Promise<void> {
  await page.goto(address);
  await page.waitForLoadState("networkidle");
}

/** Waits for a message that comes up at the edge of the page; screen readers are told the same a second time. */
export async function told(page: Page, words: string | RegExp): Promise<void> {
  await page.getByText(words).first().waitFor();
}
