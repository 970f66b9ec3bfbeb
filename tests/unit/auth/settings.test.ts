import { beforeEach, expect, test, vi } from "vitest";

beforeEach(() => {
  vi.resetModules();
  vi.stubEnv("DATABASE_URL", "mysql://c:c@127.0.0.1:3306/cembalo");
  vi.stubEnv("AUTH_SECRET", "x".repeat(44));
  vi.stubEnv("SMTP_URL", "smtp://127.0.0.1:1025");
});

async function settings(address: string, mailbox: string) {
  vi.stubEnv("AUTH_URL", address);
  vi.stubEnv("MAILBOX_DIR", mailbox);
  return (await import("@/lib/env")).env();
}

test("the local mailbox is for this machine's own address only", async () => {
  expect((await settings("http://localhost:3000", "/var/mail/kept")).MAILBOX_DIR).toBe(
    "/var/mail/kept",
  );
  vi.resetModules();
  await expect(settings("https://season.example", "/var/mail/kept")).rejects.toThrow(
    /MAILBOX_DIR: shows everyone's mail/,
  );
});

test("an empty mailbox folder is none: there is no such page", async () => {
  expect((await settings("https://season.example", "")).MAILBOX_DIR).toBeUndefined();
});
