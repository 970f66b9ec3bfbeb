import path from "node:path";
import { drizzle } from "drizzle-orm/mysql2";
import { migrate } from "drizzle-orm/mysql2/migrator";
import mysql from "mysql2/promise";
import { env } from "@/lib/env";

/** Brings the database of DATABASE_URL to the newest migration. Safe to run again. */
const connection = await mysql.createConnection({ uri: env().DATABASE_URL, timezone: "Z" });
await migrate(drizzle({ client: connection }), {
  migrationsFolder: path.join(import.meta.dirname, "migrations"),
});
await connection.end();
