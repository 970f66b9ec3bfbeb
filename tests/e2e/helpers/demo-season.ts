import { createHash, randomBytes } from "node:crypto";
import { readdirSync, readFileSync } from "node:fs";
import path from "node:path";
import mysql from "mysql2/promise";
import { v7 } from "uuid";

/** The demo's people, by what they are first of all; README.md names them, the seed gives them their positions. */
export const PEOPLE = {
  md: "runa.oake@demo.example",
  assistant: "ilse.varga@demo.example",
  stageManager: "bram.teller@demo.example",
  director: "odile.castellane@demo.example",
  hanne: "hanne.briscoe@demo.example",
  osric: "osric.dlamini@demo.example",
  wren: "wren.tallis@demo.example",
  teo: "teo.sandoval-reyes@demo.example",
  imke: "imke.dorne@demo.example",
  admin: "cora.finch@demo.example",
} as const;

export type Person = keyof typeof PEOPLE;
export type Viewer = Person | "nobody";
export const EVERY_PERSON = Object.keys(PEOPLE) as Person[];
export const EVERY_VIEWER: Viewer[] = [...EVERY_PERSON, "nobody"];

/** A variable the command that runs these tests sets. Throws when it is missing. */
export function setting(name: string): string {
  const value = process.env[name];
  if (value === undefined || value === "")
    throw new Error(`${name} is not set: run npm test -- e2e`);
  return value;
}

/** What the pages of the table are opened on: ids as text, the rest as paths or secrets. */
export type Places = {
  company: string;
  /** Auditions under way; no cast list yet. */
  tidewatcher: string;
  /** In casting, at the second company; no cast list yet. */
  candlemas: string;
  /** In rehearsal; the cast list is out. */
  marrow: string;
  auditionDay: string;
  call: string;
  callDay: string;
  score: string;
  issue: string;
  doorPath: string;
  invitation: string;
  signInLink: string;
  message: string;
};

/** Where each person's session secret is kept while the tests run; nobody has none. */
export type Sessions = Record<Viewer, string | null>;

type Row = Record<string, unknown>;

const asUuid = (hex: string): string =>
  hex.toLowerCase().replace(/^(.{8})(.{4})(.{4})(.{4})(.{12})$/, "$1-$2-$3-$4-$5");
const asBytes = (id: string): Buffer => Buffer.from(id.replaceAll("-", ""), "hex");
const hashOf = (secret: string): string => createHash("sha256").update(secret).digest("hex");
const newSecret = (): string => randomBytes(32).toString("base64url");

/** The database of the application under test. */
export class DemoDatabase {
  private readonly connection: mysql.Connection;

  private constructor(connection: mysql.Connection) {
    this.connection = connection;
  }

  static async open(): Promise<DemoDatabase> {
    return new DemoDatabase(
      await mysql.createConnection({
        uri: setting("DATABASE_URL"),
        timezone: "Z",
        dateStrings: ["DATE"],
      }),
    );
  }

  close = (): Promise<void> => this.connection.end();

  /** The first row, or null. */
  async one(sql: string, values: unknown[] = []): Promise<Row | null> {
    const [rows] = await this.connection.query<mysql.RowDataPacket[]>(sql, values);
    return rows[0] ?? null;
  }

  /** The `id` (hexadecimal) of the first row, as UUID text. Throws when the demo has no such row. */
  async idOf(what: string, sql: string, values: unknown[] = []): Promise<string> {
    const row = await this.one(sql, values);
    if (typeof row?.["id"] !== "string") throw new Error(`The demo season has no ${what}.`);
    return asUuid(row["id"]);
  }

  /** Signs everyone in at once, past the sign-in page (one test of its own goes through it). */
  async signInEveryone(): Promise<Sessions> {
    const sessions: Partial<Sessions> = { nobody: null };
    for (const person of EVERY_PERSON) {
      const secret = newSecret();
      const [result] = await this.connection.query<mysql.ResultSetHeader>(
        "insert into sessions (session_token, user_id, expires, device, created_at) select ?, id, date_add(utc_timestamp(), interval 1 day), 'Every page', utc_timestamp() from users where email = ?",
        [secret, PEOPLE[person]],
      );
      if (result.affectedRows !== 1) throw new Error(`The demo has no ${PEOPLE[person]}.`);
      sessions[person] = secret;
    }
    return sessions as Sessions;
  }

  /** Takes back what was put in past the application: the sessions, and the invitation with this secret. */
  async takeBack(invitation: string): Promise<void> {
    await this.connection.query("delete from sessions where device = 'Every page'");
    await this.connection.query("delete from invitations where token_hash = ?", [
      hashOf(invitation),
    ]);
  }

  /** An open invitation of Imke's; its page only shows it, so that nobody accepts it here. */
  async invite(): Promise<string> {
    const secret = newSecret();
    const position = await this.idOf(
      "position of Imke's",
      "select hex(p.id) as id from positions p join people on people.id = p.person_id join users on users.id = people.user_id where users.email = ? and p.ended_at is null limit 1",
      [PEOPLE.imke],
    );
    await this.connection.query(
      "insert into invitations (id, position_id, email, token_hash, expires_at, created_at) values (?, ?, ?, ?, date_add(utc_timestamp(), interval 1 day), utc_timestamp())",
      [asBytes(v7()), asBytes(position), PEOPLE.imke, hashOf(secret)],
    );
    return secret;
  }

  /** The newest issue of a production's day, or null when none has gone out. */
  async issueOf(production: string, day: string): Promise<string | null> {
    const row = await this.one(
      "select hex(id) as id from call_sheet_issues where production_id = ? and local_date = ? order by number desc limit 1",
      [asBytes(production), day],
    );
    return typeof row?.["id"] === "string" ? asUuid(row["id"]) : null;
  }

  /** The ids that the demo season has from the start. */
  async findPlaces(): Promise<Omit<Places, "issue" | "invitation" | "signInLink" | "message">> {
    const production = (title: string) =>
      this.idOf(title, "select hex(id) as id from productions where title = ?", [title]);
    const [tidewatcher, candlemas, marrow] = [
      await production("The Tidewatcher"),
      await production("A Fair at Candlemas"),
      await production("Marrow Street"),
    ];
    // Not today’s: the day a visitor would look at first is left as the demo has it.
    const call = await this.idOf(
      "second published call",
      "select hex(id) as id from calls where production_id = ? and state = 'published' and kind = 'music' and local_date > (select min(local_date) from calls where production_id = ?) order by starts_at limit 1",
      [asBytes(marrow), asBytes(marrow)],
    );
    const day = await this.one("select local_date from calls where id = ?", [asBytes(call)]);
    return {
      company: await this.idOf(
        "company",
        "select hex(company_id) as id from productions where id = ?",
        [asBytes(marrow)],
      ),
      tidewatcher,
      candlemas,
      marrow,
      auditionDay: await this.idOf(
        "audition day",
        "select hex(id) as id from audition_days where production_id = ? and removed_at is null order by local_date limit 1",
        [asBytes(tidewatcher)],
      ),
      call,
      callDay: String(day?.["local_date"]),
      score: await this.idOf(
        "score that was read",
        "select hex(id) as id from scores where production_id = ? order by created_at limit 1",
        [asBytes(marrow)],
      ),
      doorPath: doorPath(),
    };
  }
}

function doorPath(): string {
  const { links } = JSON.parse(readFileSync(setting("E2E_PEOPLE_FILE"), "utf8")) as {
    links: { path: string }[];
  };
  const found = links.find((link) => link.path.startsWith("/door/"));
  if (!found) throw new Error("The demo has no link for the monitor.");
  return found.path;
}

/** The newest message of the local mailbox with a sign-in link in it: its id, and the link's path. Null when there is none. */
export function newestSignInMail(): { id: string; link: string } | null {
  const folder = setting("E2E_MAIL_DIR");
  const names = readdirSync(folder).filter((name) => name.endsWith(".json"));
  for (const name of names.toSorted().toReversed()) {
    const { id, text } = JSON.parse(readFileSync(path.join(folder, name), "utf8")) as {
      id: string;
      text: string;
    };
    const link = /https?:\/\/[^/\s]+(\/sign-in\/link\?\S+)/.exec(text)?.[1];
    if (link !== undefined) return { id, link };
  }
  return null;
}
