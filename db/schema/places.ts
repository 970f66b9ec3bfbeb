import { sql } from "drizzle-orm";
import {
  boolean,
  check,
  int,
  mysqlTable,
  primaryKey,
  uniqueIndex,
  varchar,
} from "drizzle-orm/mysql-core";
import { id, uuid } from "../columns";
import { companies } from "./companies";

export const venues = mysqlTable(
  "venues",
  {
    id: id(),
    companyId: uuid("company_id")
      .notNull()
      .references(() => companies.id),
    name: varchar("name", { length: 160 }).notNull(),
    address: varchar("address", { length: 255 }).notNull().default(""),
  },
  (t) => [uniqueIndex("venues_company_name").on(t.companyId, t.name)],
);

export const rooms = mysqlTable(
  "rooms",
  {
    id: id(),
    companyId: uuid("company_id")
      .notNull()
      .references(() => companies.id),
    venueId: uuid("venue_id")
      .notNull()
      .references(() => venues.id),
    name: varchar("name", { length: 120 }).notNull(),
    hasPiano: boolean("has_piano").notNull().default(true),
  },
  (t) => [uniqueIndex("rooms_venue_name").on(t.venueId, t.name)],
);

/** Minutes from door to door between two venues; the pair is kept once, the smaller id first. */
export const travelTimes = mysqlTable(
  "travel_times",
  {
    venueA: uuid("venue_a")
      .notNull()
      .references(() => venues.id, { onDelete: "cascade" }),
    venueB: uuid("venue_b")
      .notNull()
      .references(() => venues.id, { onDelete: "cascade" }),
    minutes: int("minutes").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.venueA, t.venueB] }),
    check("travel_order", sql`${t.venueA} < ${t.venueB}`),
    check("travel_minutes", sql`${t.minutes} between 0 and 1440`),
  ],
);
