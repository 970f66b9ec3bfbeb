import { sql } from "drizzle-orm";
import {
  boolean,
  check,
  datetime,
  double,
  index,
  int,
  json,
  mysqlEnum,
  mysqlTable,
  smallint,
  text,
  tinyint,
  uniqueIndex,
  varchar,
} from "drizzle-orm/mysql-core";
import { id, uuid } from "../columns";
import { files } from "./around";
import { productions } from "./seasons";

/** Sung quarters by MIDI pitch, as text keys: `{ "60": 11.5 }`. */
type Histogram = Record<string, number>;

/** One reading of a score file; a newer file of the same work is a higher version. */
export const scores = mysqlTable(
  "scores",
  {
    id: id(),
    productionId: uuid("production_id")
      .notNull()
      .references(() => productions.id),
    fileId: uuid("file_id")
      .notNull()
      .references(() => files.id),
    title: varchar("title", { length: 200 }).notNull(),
    version: int("version").notNull().default(1),
    createdAt: datetime("created_at", { mode: "date", fsp: 3 })
      .notNull()
      .$defaultFn(() => new Date()),
  },
  (t) => [index("scores_production").on(t.productionId)],
);

export const scoreParts = mysqlTable(
  "score_parts",
  {
    id: id(),
    scoreId: uuid("score_id")
      .notNull()
      .references(() => scores.id, { onDelete: "cascade" }),
    partId: varchar("part_id", { length: 80 }).notNull(),
    place: int("place").notNull(),
    name: varchar("name", { length: 160 }).notNull(),
    vocal: boolean("vocal").notNull(),
    octaveShift: tinyint("octave_shift").notNull().default(0),
    low: tinyint("low"),
    high: tinyint("high"),
    lowSpelled: varchar("low_spelled", { length: 8 }),
    highSpelled: varchar("high_spelled", { length: 8 }),
    optionalLow: tinyint("optional_low"),
    optionalHigh: tinyint("optional_high"),
    histogram: json("histogram").$type<Histogram>(),
    warnings: json("warnings").$type<string[]>().notNull(),
  },
  (t) => [uniqueIndex("score_parts_once").on(t.scoreId, t.partId, t.place)],
);

export const numbers = mysqlTable(
  "numbers",
  {
    id: id(),
    productionId: uuid("production_id")
      .notNull()
      .references(() => productions.id),
    scoreId: uuid("score_id").references(() => scores.id),
    label: varchar("label", { length: 12 }).notNull(),
    title: varchar("title", { length: 200 }).notNull(),
    place: int("place").notNull(),
    /** Fifths of the first key signature, −7 to 7. */
    keyFifths: tinyint("key_fifths"),
    /** Read or typed name of the key, such as "E" or "c". */
    keyName: varchar("key_name", { length: 8 }),
    metre: varchar("metre", { length: 12 }),
    /** Quarter notes a minute. */
    tempo: smallint("tempo"),
    bars: int("bars"),
    /** Length in seconds, as the score gives it or as typed. */
    seconds: int("seconds"),
    version: int("version").notNull().default(1),
    removedAt: datetime("removed_at", { mode: "date", fsp: 3 }),
  },
  (t) => [
    index("numbers_production").on(t.productionId, t.place),
    check("numbers_key", sql`${t.keyFifths} is null or ${t.keyFifths} between -7 and 7`),
    check("numbers_bars", sql`${t.bars} is null or ${t.bars} > 0`),
  ],
);

export const ROLE_KINDS = ["principal", "supporting", "ensemble"] as const;

export const roles = mysqlTable(
  "roles",
  {
    id: id(),
    productionId: uuid("production_id")
      .notNull()
      .references(() => productions.id),
    name: varchar("name", { length: 120 }).notNull(),
    kind: mysqlEnum("kind", ROLE_KINDS).notNull().default("principal"),
    place: int("place").notNull(),
    /** How many people the role needs: 1 for a part, more for an ensemble. */
    needed: int("needed").notNull().default(1),
    covers: int("covers").notNull().default(0),
    about: text("about"),
    version: int("version").notNull().default(1),
    removedAt: datetime("removed_at", { mode: "date", fsp: 3 }),
  },
  (t) => [
    index("roles_production").on(t.productionId, t.place),
    check("roles_needed", sql`${t.needed} between 1 and 400`),
  ],
);

/** What a role sings in a number: read from a part of a score, or typed. */
export const vocalLines = mysqlTable(
  "vocal_lines",
  {
    id: id(),
    roleId: uuid("role_id")
      .notNull()
      .references(() => roles.id),
    numberId: uuid("number_id")
      .notNull()
      .references(() => numbers.id),
    scorePartId: uuid("score_part_id").references(() => scoreParts.id),
    /** The part's id in its score, or "typed": with the bars, what makes a line of a role in a number one line. */
    partKey: varchar("part_key", { length: 80 }).notNull().default("typed"),
    barsKey: varchar("bars_key", { length: 40 }).notNull().default("all"),
    source: mysqlEnum("source", ["read", "typed"]).notNull(),
    low: tinyint("low").notNull(),
    high: tinyint("high").notNull(),
    lowSpelled: varchar("low_spelled", { length: 8 }).notNull(),
    highSpelled: varchar("high_spelled", { length: 8 }).notNull(),
    optionalLow: tinyint("optional_low"),
    optionalHigh: tinyint("optional_high"),
    histogram: json("histogram").$type<Histogram>(),
    quarters: double("quarters"),
    lowBar: varchar("low_bar", { length: 12 }),
    highBar: varchar("high_bar", { length: 12 }),
  },
  (t) => [
    uniqueIndex("vocal_lines_once").on(t.roleId, t.numberId, t.partKey, t.barsKey),
    index("vocal_lines_number").on(t.numberId),
    check("vocal_lines_order", sql`${t.low} <= ${t.high} and ${t.low} >= 0 and ${t.high} <= 127`),
  ],
);
