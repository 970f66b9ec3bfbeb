import { sql } from "drizzle-orm";
import {
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
import { exactText, id, uuid } from "../columns";
import { people } from "./companies";
import { rooms } from "./places";
import { productions } from "./seasons";

export const auditionDays = mysqlTable(
  "audition_days",
  {
    id: id(),
    productionId: uuid("production_id")
      .notNull()
      .references(() => productions.id),
    localDate: date("local_date", { mode: "string" }).notNull(),
    zone: varchar("zone", { length: 64 }).notNull(),
    slotMinutes: smallint("slot_minutes").notNull(),
    /** The pianist rests `restMinutes` after at most `restAfterMinutes` of playing. */
    restAfterMinutes: smallint("rest_after_minutes").notNull().default(80),
    restMinutes: smallint("rest_minutes").notNull().default(10),
    lunchMinutes: smallint("lunch_minutes").notNull().default(0),
    /** Local times "HH:MM" between which lunch may lie. */
    lunchFrom: varchar("lunch_from", { length: 5 }),
    lunchTo: varchar("lunch_to", { length: 5 }),
    version: int("version").notNull().default(1),
    removedAt: datetime("removed_at", { mode: "date", fsp: 3 }),
  },
  (t) => [
    index("audition_days_production").on(t.productionId, t.localDate),
    check("audition_days_slot", sql`${t.slotMinutes} between 1 and 120`),
  ],
);

export const auditionRooms = mysqlTable(
  "audition_rooms",
  {
    id: id(),
    dayId: uuid("day_id")
      .notNull()
      .references(() => auditionDays.id),
    roomId: uuid("room_id")
      .notNull()
      .references(() => rooms.id),
    opensAt: datetime("opens_at", { mode: "date", fsp: 3 }).notNull(),
    closesAt: datetime("closes_at", { mode: "date", fsp: 3 }).notNull(),
  },
  (t) => [
    uniqueIndex("audition_rooms_once").on(t.dayId, t.roomId),
    check("audition_rooms_order", sql`${t.opensAt} < ${t.closesAt}`),
  ],
);

/** Times of a room. The migration adds `unique (audition_room_id, held without overlaps)`. */
export const slots = mysqlTable(
  "slots",
  {
    id: id(),
    auditionRoomId: uuid("audition_room_id")
      .notNull()
      .references(() => auditionRooms.id, { onDelete: "cascade" }),
    kind: mysqlEnum("kind", ["slot", "rest", "lunch", "hold"]).notNull(),
    startsAt: datetime("starts_at", { mode: "date", fsp: 3 }).notNull(),
    endsAt: datetime("ends_at", { mode: "date", fsp: 3 }).notNull(),
  },
  (t) => [uniqueIndex("slots_room_start").on(t.auditionRoomId, t.startsAt)],
);

export const SIGN_UP_STATES = ["listed", "invited", "confirmed", "declined", "withdrawn"] as const;

export const signUps = mysqlTable(
  "sign_ups",
  {
    id: id(),
    productionId: uuid("production_id")
      .notNull()
      .references(() => productions.id),
    personId: uuid("person_id")
      .notNull()
      .references(() => people.id),
    state: mysqlEnum("state", SIGN_UP_STATES).notNull().default("listed"),
    /** In the order the server took them. */
    place: int("place").notNull(),
    song: varchar("song", { length: 200 }),
    bars: smallint("bars"),
    asksFor: varchar("asks_for", { length: 200 }),
    /** Local times "HH:MM" the singer asked for. */
    notBefore: varchar("not_before", { length: 5 }),
    notAfter: varchar("not_after", { length: 5 }),
    invitedAt: datetime("invited_at", { mode: "date", fsp: 3 }),
    answeredAt: datetime("answered_at", { mode: "date", fsp: 3 }),
    version: int("version").notNull().default(1),
    createdAt: datetime("created_at", { mode: "date", fsp: 3 })
      .notNull()
      .$defaultFn(() => new Date()),
  },
  (t) => [
    uniqueIndex("sign_ups_once").on(t.productionId, t.personId),
    index("sign_ups_person").on(t.personId),
  ],
);

/** Who sings in which slot: a slot once, a singer once a day. */
export const slotAssignments = mysqlTable(
  "slot_assignments",
  {
    slotId: uuid("slot_id").primaryKey(),
    signUpId: uuid("sign_up_id")
      .notNull()
      .references(() => signUps.id),
    dayId: uuid("day_id")
      .notNull()
      .references(() => auditionDays.id),
  },
  (t) => [
    uniqueIndex("slot_assignments_day").on(t.signUpId, t.dayId),
    foreignKey({
      name: "slot_assignments_slot_fk",
      columns: [t.slotId],
      foreignColumns: [slots.id],
    }),
  ],
);

/** What the door recorded on the day. */
export const attendances = mysqlTable(
  "attendances",
  {
    dayId: uuid("day_id")
      .notNull()
      .references(() => auditionDays.id),
    signUpId: uuid("sign_up_id")
      .notNull()
      .references(() => signUps.id),
    hereAt: datetime("here_at", { mode: "date", fsp: 3 }),
    inAt: datetime("in_at", { mode: "date", fsp: 3 }),
    outAt: datetime("out_at", { mode: "date", fsp: 3 }),
  },
  (t) => [primaryKey({ columns: [t.dayId, t.signUpId] })],
);

/** The monitor's link: good for one audition day, and only on it. */
export const dayLinks = mysqlTable("day_links", {
  id: id(),
  dayId: uuid("day_id")
    .notNull()
    .references(() => auditionDays.id),
  tokenHash: exactText("token_hash", { length: 64 }).notNull().unique(),
  createdAt: datetime("created_at", { mode: "date", fsp: 3 })
    .notNull()
    .$defaultFn(() => new Date()),
  revokedAt: datetime("revoked_at", { mode: "date", fsp: 3 }),
});
