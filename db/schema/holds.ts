import { sql } from "drizzle-orm";
import {
  check,
  datetime,
  foreignKey,
  index,
  mysqlEnum,
  mysqlTable,
  uniqueIndex,
} from "drizzle-orm/mysql-core";
import { id, uuid } from "../columns";
import { auditionRooms } from "./auditions";
import { callbackRounds } from "./callbacks";
import { calls } from "./calls";
import { people } from "./companies";
import { rooms } from "./places";
import { productions } from "./seasons";

/**
 * When a pianist plays: for a room of an audition day, or for a published call. The migration adds
 * `unique (bookee_id, held without overlaps)`: one pianist cannot be taken twice at once, in any company.
 */
export const pianistSessions = mysqlTable(
  "pianist_sessions",
  {
    id: id(),
    productionId: uuid("production_id")
      .notNull()
      .references(() => productions.id),
    personId: uuid("person_id")
      .notNull()
      .references(() => people.id),
    /** The login when there is one, else the company's record: what cannot be in two places. */
    bookeeId: uuid("bookee_id").notNull(),
    auditionRoomId: uuid("audition_room_id").references(() => auditionRooms.id),
    callId: uuid("call_id"),
    startsAt: datetime("starts_at", { mode: "date", fsp: 3 }).notNull(),
    endsAt: datetime("ends_at", { mode: "date", fsp: 3 }).notNull(),
    state: mysqlEnum("state", ["assigned", "confirmed"]).notNull().default("assigned"),
  },
  (t) => [
    index("pianist_sessions_person").on(t.personId, t.startsAt),
    index("pianist_sessions_production").on(t.productionId),
    uniqueIndex("pianist_sessions_call").on(t.callId),
    foreignKey({
      name: "pianist_sessions_call_fk",
      columns: [t.callId],
      foreignColumns: [calls.id],
    }),
    check("pianist_sessions_one", sql`(${t.auditionRoomId} is null) <> (${t.callId} is null)`),
  ],
);

/**
 * Who holds a room, and when. The migration adds an application-time period and the key
 * `unique (room_id, held without overlaps)`: one room cannot be held twice at once, whoever writes.
 */
export const roomBookings = mysqlTable(
  "room_bookings",
  {
    id: id(),
    roomId: uuid("room_id")
      .notNull()
      .references(() => rooms.id),
    startsAt: datetime("starts_at", { mode: "date", fsp: 3 }).notNull(),
    endsAt: datetime("ends_at", { mode: "date", fsp: 3 }).notNull(),
    auditionRoomId: uuid("audition_room_id").references(() => auditionRooms.id, {
      onDelete: "cascade",
    }),
    callId: uuid("call_id").references(() => calls.id, { onDelete: "cascade" }),
    callbackRoundId: uuid("callback_round_id"),
  },
  (t) => [
    foreignKey({
      name: "room_bookings_round_fk",
      columns: [t.callbackRoundId],
      foreignColumns: [callbackRounds.id],
    }),
    uniqueIndex("room_bookings_round").on(t.callbackRoundId),
    uniqueIndex("room_bookings_audition").on(t.auditionRoomId),
    uniqueIndex("room_bookings_call").on(t.callId),
    index("room_bookings_room").on(t.roomId, t.startsAt),
    check(
      "room_bookings_one",
      sql`(${t.auditionRoomId} is not null) + (${t.callId} is not null) + (${t.callbackRoundId} is not null) = 1`,
    ),
  ],
);
