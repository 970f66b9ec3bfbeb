import {
  datetime,
  foreignKey,
  index,
  int,
  json,
  mysqlEnum,
  mysqlTable,
  primaryKey,
  text,
  uniqueIndex,
  varchar,
} from "drizzle-orm/mysql-core";
import { id, uuid } from "../columns";
import { people } from "./companies";
import { rooms } from "./places";
import { roles } from "./score";
import { productions } from "./seasons";

export const callbackRounds = mysqlTable(
  "callback_rounds",
  {
    id: id(),
    productionId: uuid("production_id")
      .notNull()
      .references(() => productions.id),
    title: varchar("title", { length: 120 }).notNull(),
    startsAt: datetime("starts_at", { mode: "date", fsp: 3 }),
    endsAt: datetime("ends_at", { mode: "date", fsp: 3 }),
    zone: varchar("zone", { length: 64 }).notNull(),
    roomId: uuid("room_id").references(() => rooms.id),
    material: text("material"),
    /** How often the list has gone out; 0 while it is a draft. */
    issue: int("issue").notNull().default(0),
    publishedAt: datetime("published_at", { mode: "date", fsp: 3 }),
    version: int("version").notNull().default(1),
  },
  (t) => [index("callback_rounds_production").on(t.productionId)],
);

/** The draft: who is marked to be called back for what. Nobody outside the music team and the table sees it. */
export const callbackMarks = mysqlTable(
  "callback_marks",
  {
    roundId: uuid("round_id").notNull(),
    personId: uuid("person_id")
      .notNull()
      .references(() => people.id),
    roleId: uuid("role_id")
      .notNull()
      .references(() => roles.id),
    markedAt: datetime("marked_at", { mode: "date", fsp: 3 })
      .notNull()
      .$defaultFn(() => new Date()),
  },
  (t) => [
    primaryKey({ columns: [t.roundId, t.personId, t.roleId] }),
    foreignKey({
      name: "callback_marks_round_fk",
      columns: [t.roundId],
      foreignColumns: [callbackRounds.id],
    }),
  ],
);

export type CallbackSnapshot = {
  round: string;
  roles: string[];
  startsAt: string | null;
  endsAt: string | null;
  zone: string;
  room: string | null;
  material: string | null;
};

/** What was published to one person: never altered, only followed by the next issue. */
export const callbackInvitations = mysqlTable(
  "callback_invitations",
  {
    id: id(),
    roundId: uuid("round_id").notNull(),
    personId: uuid("person_id")
      .notNull()
      .references(() => people.id),
    issue: int("issue").notNull(),
    snapshot: json("snapshot").$type<CallbackSnapshot>().notNull(),
    publishedAt: datetime("published_at", { mode: "date", fsp: 3 }).notNull(),
    /** Set on an older issue, or when the person is no longer on the list. */
    supersededAt: datetime("superseded_at", { mode: "date", fsp: 3 }),
    answer: mysqlEnum("answer", ["yes", "no"]),
    answeredAt: datetime("answered_at", { mode: "date", fsp: 3 }),
  },
  (t) => [
    uniqueIndex("callback_invitations_once").on(t.roundId, t.personId, t.issue),
    index("callback_invitations_person").on(t.personId),
    foreignKey({
      name: "callback_invitations_round_fk",
      columns: [t.roundId],
      foreignColumns: [callbackRounds.id],
    }),
  ],
);
