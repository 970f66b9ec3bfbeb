import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterAll, beforeEach, expect, test, vi } from "vitest";

const settings = vi.hoisted(() => ({ MAILBOX_DIR: undefined as string | undefined }));
vi.mock("@/lib/env", () => ({ env: () => settings }));
const { listLocalMail, readLocalMail } = await import("@/lib/services/mail/local-mailbox");

const outer = mkdtempSync(path.join(tmpdir(), "mailbox-"));
const folder = mkdtempSync(path.join(outer, "mail-"));
const message = (id: string) => ({
  id,
  to: ["wren@people.example"],
  from: "Cembalo",
  subject: `Subject ${id}`,
  text: "Text",
  html: "<b>never read</b>",
  date: "2027-03-01T10:00:00.000Z",
});
writeFileSync(
  path.join(folder, "00000000000001-00001-7.json"),
  JSON.stringify(message("00000000000001-00001-7")),
);
writeFileSync(
  path.join(folder, "00000000000002-00001-7.json"),
  JSON.stringify(message("00000000000002-00001-7")),
);
writeFileSync(path.join(folder, "00000000000003-00001-7.json"), "{ half a message");
writeFileSync(path.join(outer, "secret.json"), JSON.stringify(message("secret")));

beforeEach(() => {
  settings.MAILBOX_DIR = folder;
});
afterAll(() => rmSync(outer, { recursive: true }));

test("the newest message comes first; one that is only half written is left out", async () => {
  expect((await listLocalMail())?.map((m) => m.id)).toEqual([
    "00000000000002-00001-7",
    "00000000000001-00001-7",
  ]);
});

test("a message is read without its HTML", async () => {
  expect(await readLocalMail("00000000000001-00001-7")).toEqual({
    id: "00000000000001-00001-7",
    to: ["wren@people.example"],
    from: "Cembalo",
    subject: "Subject 00000000000001-00001-7",
    text: "Text",
    date: "2027-03-01T10:00:00.000Z",
  });
});

test("an id that is a path reads nothing outside the folder", async () => {
  expect(await readLocalMail("secret")).toBeNull();
  expect(await readLocalMail("../secret")).toBeNull();
  expect(await readLocalMail("..%2Fsecret")).toBeNull();
  expect(await readLocalMail(path.join(outer, "secret"))).toBeNull();
});

test("where mail is really sent there is no mailbox", async () => {
  settings.MAILBOX_DIR = undefined;
  expect(await listLocalMail()).toBeNull();
  expect(await readLocalMail("00000000000001-00001-7")).toBeNull();
});
