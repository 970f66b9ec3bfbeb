import "server-only";
import { readdir, readFile } from "node:fs/promises";
import path from "node:path";
import { z } from "zod";
import { env } from "@/lib/env";

const messageSchema = z.object({
  id: z.string(),
  to: z.array(z.string()),
  from: z.string().default(""),
  subject: z.string().default(""),
  text: z.string().default(""),
  date: z.string(),
});

/** A message that the local mail fake took instead of sending it on. */
export type LocalMessage = z.output<typeof messageSchema>;

const ID = /^[\w-]{1,100}$/;
const SHOWN = 200;

/** Where the local mail fake leaves its messages; null in an installation that really sends mail. */
function mailboxFolder(): string | null {
  return env().MAILBOX_DIR ?? null;
}

/** The newest messages first. Null when there is no local mailbox. */
export async function listLocalMail(): Promise<LocalMessage[] | null> {
  const folder = mailboxFolder();
  if (folder === null) return null;
  const names = await readdir(folder).catch(() => []);
  const newest = names
    .filter((name) => name.endsWith(".json"))
    .toSorted()
    .toReversed()
    .slice(0, SHOWN);
  const read = await Promise.all(
    newest.map((name) => readMessage(folder, name.slice(0, -".json".length))),
  );
  return read.filter((message) => message !== null);
}

/** One message, or null when there is none by that id, or no local mailbox. */
export async function readLocalMail(id: string): Promise<LocalMessage | null> {
  const folder = mailboxFolder();
  return folder === null ? null : readMessage(folder, id);
}

async function readMessage(folder: string, id: string): Promise<LocalMessage | null> {
  // The id comes from an address: nothing but a plain name may become part of a path.
  if (!ID.test(id)) return null;
  try {
    const parsed = messageSchema.safeParse(
      JSON.parse(await readFile(path.join(folder, `${id}.json`), "utf8")),
    );
    return parsed.success ? parsed.data : null;
  } catch {
    return null;
  }
}
