import { sql } from "drizzle-orm";
import {
  check,
  date,
  datetime,
  index,
  int,
  mysqlEnum,
  mysqlTable,
  uniqueIndex,
  varchar,
} from "drizzle-orm/mysql-core";
import type { AnyMySqlColumn } from "drizzle-orm/mysql-core";
import { id, uuid } from "../columns";
import { companies } from "./companies";

export const seasons = mysqlTable(
  "seasons",
  {
    id: id(),
    companyId: uuid("company_id")
      .notNull()
      .references((): AnyMySqlColumn => companies.id),
    title: varchar("title", { length: 120 }).notNull(),
    startsOn: date("starts_on", { mode: "string" }).notNull(),
    endsOn: date("ends_on", { mode: "string" }).notNull(),
  },
  (t) => [
    uniqueIndex("seasons_company_title").on(t.companyId, t.title),
    check("seasons_order", sql`${t.startsOn} <= ${t.endsOn}`),
  ],
);

export const PRODUCTION_STAGES = [
  "planning",
  "auditions",
  "casting",
  "rehearsals",
  "running",
  "closed",
] as const;

export const productions = mysqlTable(
  "productions",
  {
    id: id(),
    companyId: uuid("company_id")
      .notNull()
      .references((): AnyMySqlColumn => companies.id),
    seasonId: uuid("season_id").references(() => seasons.id),
    title: varchar("title", { length: 160 }).notNull(),
    stage: mysqlEnum("stage", PRODUCTION_STAGES).notNull().default("planning"),
    opensOn: date("opens_on", { mode: "string" }),
    closesOn: date("closes_on", { mode: "string" }),
    /** Months after the cast list that forms and notes of people not cast are kept. */
    retentionMonths: int("retention_months").notNull().default(6),
    /** Before this the stage manager and others do not see who is cast. */
    castPublishedAt: datetime("cast_published_at", { mode: "date", fsp: 3 }),
    version: int("version").notNull().default(1),
    createdAt: datetime("created_at", { mode: "date", fsp: 3 })
      .notNull()
      .$defaultFn(() => new Date()),
    removedAt: datetime("removed_at", { mode: "date", fsp: 3 }),
  },
  (t) => [
    index("productions_company").on(t.companyId),
    check("productions_retention", sql`${t.retentionMonths} between 1 and 60`),
    check(
      "productions_run",
      sql`${t.opensOn} is null or ${t.closesOn} is null or ${t.opensOn} <= ${t.closesOn}`,
    ),
  ],
);
