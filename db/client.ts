import { drizzle } from "drizzle-orm/mysql2";
import type { MySql2Database } from "drizzle-orm/mysql2";
import mysql from "mysql2/promise";
import type { Pool } from "mysql2/promise";
import { env } from "@/lib/env";
import * as schema from "./schema";

export type Db = MySql2Database<typeof schema>;
export type Tx = Parameters<Parameters<Db["transaction"]>[0]>[0];

// In development the module is loaded again on every change; the pool must not be.
const kept = globalThis as unknown as { cembaloPool?: Pool };

/** The connection pool: UTC, utf8mb4, and numbers that stay numbers. */
export function pool(): Pool {
  kept.cembaloPool ??= mysql.createPool({
    uri: env().DATABASE_URL,
    timezone: "Z",
    charset: "utf8mb4_unicode_ci",
    connectionLimit: 20,
    enableKeepAlive: true,
  });
  return kept.cembaloPool;
}

export const db: Db = drizzle({ client: pool(), schema, mode: "default" });

/** Closes the pool, for scripts and tests that must end. */
export async function closePool(): Promise<void> {
  await kept.cembaloPool?.end();
  delete kept.cembaloPool;
}
