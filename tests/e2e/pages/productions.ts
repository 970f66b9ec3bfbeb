import type { Page } from "playwright-core";
import { told, visit } from "./visit";

/** Begins a company of one's own. */
export async function startCompany(page: Page, name: string): Promise<void> {
  await visit(page, "/companies/new");
  await page.getByLabel("Name").fill(name);
  await page.getByRole("button", { name: "Start the company" }).click();
  await page.waitForURL(/\/productions\/new/);
}

/** Makes a production, from the season on. Returns its address: "/productions/…". */
export async function makeProduction(
  page: Page,
  { title, company }: { title: string; company?: string },
): Promise<string> {
  if (company === undefined) await visit(page, page.url());
  else {
    await visit(page, "/season");
    await page.getByRole("link", { name: "New production" }).click();
    await page.getByLabel("Company").selectOption({ label: company });
  }
  await page.getByLabel("Title").fill(title);
  await page.getByRole("button", { name: "Make the production" }).click();
  await page.waitForURL(/\/productions\/[0-9a-f-]{36}\/score$/);
  return new URL(page.url()).pathname.replace(/\/score$/, "");
}

/** Invites somebody into a position of a production, on its page of people. */
export async function invite(
  page: Page,
  { name, address, position }: { name: string; address: string; position: string },
): Promise<void> {
  await page.getByRole("button", { name: "Invite someone" }).click();
  const form = page.getByRole("dialog");
  await form.getByLabel("Name").fill(name);
  await form.getByLabel("E-mail").fill(address);
  await form.getByLabel("Position").selectOption({ label: position });
  await form.getByRole("button", { name: "Send the invitation" }).click();
  await told(page, `The invitation to ${name} is on its way.`);
  await page
    .getByRole("region", { name: new RegExp(`^${position}`) })
    .getByText(name, { exact: true })
    .waitFor();
}
