import { eq } from "drizzle-orm";
import mysql from "mysql2/promise";
import { closePool, db } from "@/db/client";
import { productions, users } from "@/db/schema";
import { loadActor } from "@/lib/data/actor";
import { productionFor } from "@/lib/data/guard";
import { demoEmail } from "./lib/sign-in";
import type { BenchContext } from "./lib/sign-in";

async function perSecond(work: () => Promise<unknown>, seconds = 3): Promise<number> {
  for (let i = 0; i < 200; i += 1) await work();
  const until = performance.now() + seconds * 1000;
  let count = 0;
  const started = performance.now();
  while (performance.now() < until) {
    await work();
    count += 1;
  }
  return Math.round(count / ((performance.now() - started) / 1000));
}

/** The one-row query (a production, with its company and the permission to see it) through the data layer, and the same row through mysql2 alone. One after another, per second. */
export default async function query(ctx: BenchContext): Promise<object> {
  const [user] = await db
    .select({ id: users.id })
    .from(users)
    .where(eq(users.email, demoEmail(ctx, /^Music director/)));
  const actor = user && (await loadActor(user.id));
  const [row] = await db
    .select({ id: productions.id })
    .from(productions)
    .where(eq(productions.title, "The Tidewatcher"));
  if (!actor || !row) throw new Error("the demo season is not loaded");
  const pool = mysql.createPool({ uri: ctx.databaseUrl, timezone: "Z" });
  const idBytes = Buffer.from(row.id.replaceAll("-", ""), "hex");
  const sql =
    "select p.id, p.company_id, c.name, p.title, p.stage, c.zone, c.locale, c.paper, p.opens_on, p.closes_on, p.cast_published_at, p.version from productions p inner join companies c on c.id = p.company_id where p.id = ? and p.removed_at is null";
  const alone = await perSecond(() => pool.execute(sql, [idBytes]));
  const layer = await perSecond(() => productionFor(actor, row.id, "score:read"));
  await pool.end();
  await closePool();
  return {
    layerPerSecond: layer,
    mysql2PerSecond: alone,
    ratio: Number((layer / alone).toFixed(2)),
  };
}
