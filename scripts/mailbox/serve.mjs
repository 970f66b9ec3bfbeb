// The local mailbox: takes mail on a loopback port and writes each message as JSON into a folder, for the
// mailbox page and the browser tests to read. Nothing leaves the machine. Arguments: the folder, the state file.
import fs from "node:fs";
import path from "node:path";
import { simpleParser } from "mailparser";
import { SMTPServer } from "smtp-server";
import { writeJson } from "../lib/paths.mjs";

/** Older messages are dropped, so that the folder does not grow without end. */
const KEPT = 500;
const [folder, stateFile] = process.argv.slice(2);
fs.mkdirSync(folder, { recursive: true, mode: 0o700 });

let count = 0;

/** Sorts as text by the time of arrival. */
function messageId() {
  count += 1;
  return `${Date.now().toString().padStart(14, "0")}-${String(count).padStart(5, "0")}-${process.pid}`;
}

function dropOldest() {
  const names = fs
    .readdirSync(folder)
    .filter((name) => name.endsWith(".json"))
    .sort();
  for (const name of names.slice(0, Math.max(0, names.length - KEPT))) {
    fs.rmSync(path.join(folder, name), { force: true });
  }
}

async function keep(stream, session) {
  const mail = await simpleParser(stream, { skipImageLinks: true });
  const id = messageId();
  writeJson(path.join(folder, `${id}.json`), {
    id,
    to: session.envelope.rcptTo.map(({ address }) => address),
    from: mail.from?.text ?? "",
    subject: mail.subject ?? "",
    text: mail.text ?? "",
    html: mail.html || "",
    date: new Date().toISOString(),
  });
  dropOldest();
}

const server = new SMTPServer({
  authOptional: true,
  disabledCommands: ["AUTH", "STARTTLS"],
  disableReverseLookup: true,
  size: 25 * 1024 * 1024,
  onData(stream, session, done) {
    keep(stream, session).then(() => done(), done);
  },
});
server.on("error", (error) => process.stderr.write(`${error.message}\n`));
server.listen(0, "127.0.0.1", () => {
  writeJson(stateFile, { pid: process.pid, port: server.server.address().port });
});

for (const signal of ["SIGTERM", "SIGINT"]) {
  process.on(signal, () => {
    server.close(() => process.exit(0));
    setTimeout(() => process.exit(0), 500).unref();
  });
}
