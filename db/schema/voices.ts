import { sql } from "drizzle-orm";
import { check, datetime, index, mysqlEnum, mysqlTable, tinyint } from "drizzle-orm/mysql-core";
import { id, uuid } from "../columns";
import { people } from "./companies";
import { productions } from "./seasons";
import { users } from "./sign-in";

/** A singer's range as they claim it or as it was heard; the newest of a kind counts, heard beats claimed. */
export const ranges = mysqlTable(
  "ranges",
  {
    id: id(),
    personId: uuid("person_id")
      .notNull()
      .references(() => people.id),
    kind: mysqlEnum("kind", ["claimed", "heard"]).notNull(),
    low: tinyint("low").notNull(),
    high: tinyint("high").notNull(),
    comfortableLow: tinyint("comfortable_low"),
    comfortableHigh: tinyint("comfortable_high"),
    /** Where it was heard. */
    productionId: uuid("production_id").references(() => productions.id),
    givenBy: uuid("given_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: datetime("created_at", { mode: "date", fsp: 3 })
      .notNull()
      .$defaultFn(() => new Date()),
  },
  (t) => [
    index("ranges_person").on(t.personId, t.kind, t.createdAt),
    check("ranges_order", sql`${t.low} < ${t.high} and ${t.low} >= 0 and ${t.high} <= 127`),
    check(
      "ranges_comfort",
      sql`(${t.comfortableLow} is null or ${t.comfortableLow} >= ${t.low}) and (${t.comfortableHigh} is null or ${t.comfortableHigh} <= ${t.high})`,
    ),
  ],
);
