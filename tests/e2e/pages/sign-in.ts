import type { Page } from "playwright-core";
import { setting } from "../helpers/demo-season";
import type { Mailbox } from "../helpers/mailbox";
import { visit } from "./visit";

const AFTER = /\/(season|me)\b/;

/** Signs in with the password that everyone of the demo season has. */
export async function signInWithPassword(page: Page, address: string): Promise<void> {
  await visit(page, "/sign-in");
  await fillPassword(page, address);
}

async function fillPassword(page: Page, address: string): Promise<void> {
  await page.getByText("I have a password").click();
  await page.getByLabel("E-mail", { exact: true }).fill(address);
  await page.getByLabel("Password").fill(setting("E2E_DEMO_PASSWORD"));
  await page.getByRole("button", { name: "Sign in", exact: true }).click();
  await page.waitForURL(AFTER);
}

/** Asks for a link, finds it in the mail, and signs in with it. */
export async function signInByLink(page: Page, address: string, mailbox: Mailbox): Promise<void> {
  await visit(page, "/sign-in");
  await page.getByLabel("Your e-mail").fill(address);
  await page.getByRole("button", { name: "Send me a link" }).click();
  await page.getByRole("heading", { name: "Look in your mail" }).waitFor();
  await visit(page, await mailbox.link(address, /link to sign in/));
  await page.getByText(address).waitFor();
  await page.getByRole("button", { name: "Sign in", exact: true }).click();
  await page.waitForURL(AFTER);
}

/** Opens an invitation from the mail and accepts it; someone who has a login already (`address`) then signs in with it. */
export async function acceptInvitation(page: Page, link: string, address?: string): Promise<void> {
  await visit(page, link);
  await page.getByRole("heading", { name: /you are invited$/ }).waitFor();
  await page.getByRole("button", { name: /^Accept/ }).click();
  if (address !== undefined) {
    await page.waitForURL(/\/sign-in\?/);
    await fillPassword(page, address);
    return;
  }
  await page.waitForURL(AFTER);
}
