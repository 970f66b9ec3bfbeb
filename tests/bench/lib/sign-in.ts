import { randomBytes } from "node:crypto";
import { readFileSync } from "node:fs";
import mysql from "mysql2/promise";

export type BenchContext = {
  baseUrl: string;
  databaseUrl: string;
  runDir: string;
  root: string;
  appPid: number;
  peopleFile: string;
  demoPassword: string;
  chromium: string;
  log: (text: string) => void;
};

/** A session cookie for the demo person with this address, written straight into the database. */
export async function sessionCookie(ctx: BenchContext, email: string): Promise<string> {
  const connection = await mysql.createConnection({ uri: ctx.databaseUrl, timezone: "Z" });
  const token = randomBytes(32).toString("base64url");
  await connection.query(
    "insert into sessions (session_token, user_id, expires, device, created_at) select ?, id, date_add(now(), interval 1 day), 'Benchmark', now() from users where email = ?",
    [token, email],
  );
  await connection.end();
  return `authjs.session-token=${token}`;
}

/** The id of the demo production with this title. */
export async function productionId(ctx: BenchContext, title: string): Promise<string> {
  const connection = await mysql.createConnection({ uri: ctx.databaseUrl });
  const [rows] = await connection.query(
    "select lower(hex(id)) as id from productions where title = ?",
    [title],
  );
  await connection.end();
  const hex = (rows as { id: string }[])[0]?.id ?? "";
  return [
    hex.slice(0, 8),
    hex.slice(8, 12),
    hex.slice(12, 16),
    hex.slice(16, 20),
    hex.slice(20),
  ].join("-");
}

/** Demo addresses by what the person does. */
export function demoEmail(ctx: BenchContext, position: RegExp): string {
  const { people } = JSON.parse(readFileSync(ctx.peopleFile, "utf8")) as {
    people: { email: string; position: string }[];
  };
  const found = people.find((person) => position.test(person.position));
  if (!found) throw new Error(`The demo has nobody who is ${String(position)}.`);
  return found.email;
}
