import { sql } from "drizzle-orm";
import {
  boolean,
  check,
  date,
  datetime,
  foreignKey,
  index,
  int,
  mysqlEnum,
  mysqlTable,
  primaryKey,
  smallint,
  uniqueIndex,
  varchar,
} from "drizzle-orm/mysql-core";
import { id, uuid } from "../columns";
import { people } from "./companies";
import { rooms } from "./places";
import { numbers } from "./score";
import { productions } from "./seasons";

export const CALL_KINDS = [
  "music",
  "staging",
  "choreography",
  "orchestra",
  "sitzprobe",
  "wandelprobe",
  "tech",
  "dress",
  "put_in",
  "brush_up",
  "performance",
] as const;

/** A call. What people agreed on (local date, time, zone) is kept beside the instants, so that a clock change moves nothing. */
export const calls = mysqlTable(
  "calls",
  {
    id: id(),
    productionId: uuid("production_id")
      .notNull()
      .references(() => productions.id),
    kind: mysqlEnum("kind", CALL_KINDS).notNull(),
    title: varchar("title", { length: 160 }),
    startsAt: datetime("starts_at", { mode: "date", fsp: 3 }).notNull(),
    endsAt: datetime("ends_at", { mode: "date", fsp: 3 }).notNull(),
    localDate: date("local_date", { mode: "string" }).notNull(),
    localTime: varchar("local_time", { length: 5 }).notNull(),
    zone: varchar("zone", { length: 64 }).notNull(),
    roomId: uuid("room_id").references(() => rooms.id),
    leaderId: uuid("leader_id").references(() => people.id),
    /** The pianist wanted; the pianist is held only once the call is published (`pianist_sessions`). */
    pianistId: uuid("pianist_id").references(() => people.id),
    /** A draft may hold a clash; publishing takes the room and the pianist, or is refused. */
    state: mysqlEnum("state", ["draft", "published", "cancelled"]).notNull().default("draft"),
    version: int("version").notNull().default(1),
  },
  (t) => [
    index("calls_production").on(t.productionId, t.startsAt),
    check("calls_order", sql`${t.startsAt} < ${t.endsAt}`),
  ],
);

export const blocks = mysqlTable(
  "blocks",
  {
    id: id(),
    callId: uuid("call_id")
      .notNull()
      .references(() => calls.id, { onDelete: "cascade" }),
    place: int("place").notNull(),
    kind: mysqlEnum("kind", ["number", "scene", "warm_up", "break"]).notNull(),
    minutes: smallint("minutes").notNull(),
    numberId: uuid("number_id").references(() => numbers.id),
    title: varchar("title", { length: 160 }),
    bars: varchar("bars", { length: 40 }),
    detail: varchar("detail", { length: 200 }),
  },
  (t) => [
    uniqueIndex("blocks_place").on(t.callId, t.place),
    check("blocks_minutes", sql`${t.minutes} between 1 and 720`),
    check("blocks_number", sql`${t.kind} <> 'number' or ${t.numberId} is not null`),
  ],
);

/** Who is called to a block: by the score and the casting, or by hand with the reason. */
export const called = mysqlTable(
  "called",
  {
    blockId: uuid("block_id").notNull(),
    personId: uuid("person_id")
      .notNull()
      .references(() => people.id),
    source: mysqlEnum("source", ["score", "hand"]).notNull(),
    reason: varchar("reason", { length: 200 }),
    /** Needed by the score, but let off by hand. */
    excused: boolean("excused").notNull().default(false),
  },
  (t) => [
    primaryKey({ columns: [t.blockId, t.personId] }),
    index("called_person").on(t.personId),
    foreignKey({
      name: "called_block_fk",
      columns: [t.blockId],
      foreignColumns: [blocks.id],
    }).onDelete("cascade"),
  ],
);

/** Time a person says they cannot attend. */
export const conflicts = mysqlTable(
  "conflicts",
  {
    id: id(),
    personId: uuid("person_id")
      .notNull()
      .references(() => people.id),
    startsAt: datetime("starts_at", { mode: "date", fsp: 3 }).notNull(),
    endsAt: datetime("ends_at", { mode: "date", fsp: 3 }).notNull(),
    /** As given: first day, "HH:MM" or null for the whole day, last day, in the person's zone. */
    localFrom: date("local_from", { mode: "string" }).notNull(),
    localTo: date("local_to", { mode: "string" }).notNull(),
    timeFrom: varchar("time_from", { length: 5 }),
    timeTo: varchar("time_to", { length: 5 }),
    zone: varchar("zone", { length: 64 }).notNull(),
    reason: varchar("reason", { length: 160 }),
    state: mysqlEnum("state", ["asked", "agreed", "declined"]).notNull().default("asked"),
    decidedAt: datetime("decided_at", { mode: "date", fsp: 3 }),
    createdAt: datetime("created_at", { mode: "date", fsp: 3 })
      .notNull()
      .$defaultFn(() => new Date()),
    removedAt: datetime("removed_at", { mode: "date", fsp: 3 }),
  },
  (t) => [
    index("conflicts_person").on(t.personId, t.startsAt),
    check("conflicts_order", sql`${t.startsAt} < ${t.endsAt}`),
  ],
);
