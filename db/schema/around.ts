import {
  bigint,
  datetime,
  index,
  int,
  json,
  mysqlTable,
  text,
  varchar,
} from "drizzle-orm/mysql-core";
import type { AnyMySqlColumn } from "drizzle-orm/mysql-core";
import { exactText, id, uuid } from "../columns";
import { companies } from "./companies";
import { users } from "./sign-in";

/** What was uploaded: named by us, kept by `lib/services/storage`. */
export const files = mysqlTable(
  "files",
  {
    id: id(),
    companyId: uuid("company_id")
      .notNull()
      .references((): AnyMySqlColumn => companies.id),
    productionId: uuid("production_id"),
    sha256: exactText("sha256", { length: 64 }).notNull(),
    bytes: bigint("bytes", { mode: "number" }).notNull(),
    mediaType: varchar("media_type", { length: 100 }).notNull(),
    storageKey: exactText("storage_key", { length: 120 }).notNull().unique(),
    /** The name it had on the person's machine, for showing only. */
    name: varchar("name", { length: 200 }).notNull(),
    kind: varchar("kind", { length: 30 }).notNull(),
    uploadedBy: uuid("uploaded_by").references(() => users.id, { onDelete: "set null" }),
    createdAt: datetime("created_at", { mode: "date", fsp: 3 })
      .notNull()
      .$defaultFn(() => new Date()),
  },
  (t) => [index("files_production").on(t.productionId), index("files_company").on(t.companyId)],
);

/** Mail to be sent, written in the transaction of what it tells; `dedupeKey` makes "twice" impossible. */
export const outbox = mysqlTable(
  "outbox",
  {
    id: id(),
    companyId: uuid("company_id").references(() => companies.id),
    toEmail: varchar("to_email", { length: 254 }).notNull(),
    template: varchar("template", { length: 60 }).notNull(),
    data: json("data").$type<Record<string, unknown>>().notNull(),
    dedupeKey: exactText("dedupe_key", { length: 190 }).notNull().unique(),
    tries: int("tries").notNull().default(0),
    nextTryAt: datetime("next_try_at", { mode: "date", fsp: 3 })
      .notNull()
      .$defaultFn(() => new Date()),
    sentAt: datetime("sent_at", { mode: "date", fsp: 3 }),
    gaveUpAt: datetime("gave_up_at", { mode: "date", fsp: 3 }),
    lastError: text("last_error"),
    createdAt: datetime("created_at", { mode: "date", fsp: 3 })
      .notNull()
      .$defaultFn(() => new Date()),
  },
  (t) => [index("outbox_due").on(t.sentAt, t.gaveUpAt, t.nextTryAt)],
);

/** Who changed what. Small before/after only, never the text of private notes. */
export const auditEvents = mysqlTable(
  "audit_events",
  {
    id: id(),
    companyId: uuid("company_id").references(() => companies.id),
    productionId: uuid("production_id"),
    userId: uuid("user_id").references(() => users.id, { onDelete: "set null" }),
    /** Who, as the trail should still say when the login is gone. */
    actorName: varchar("actor_name", { length: 160 }).notNull(),
    action: varchar("action", { length: 60 }).notNull(),
    subjectKind: varchar("subject_kind", { length: 40 }).notNull(),
    subjectId: uuid("subject_id"),
    summary: varchar("summary", { length: 300 }).notNull(),
    detail: json("detail").$type<Record<string, unknown>>(),
    at: datetime("at", { mode: "date", fsp: 3 })
      .notNull()
      .$defaultFn(() => new Date()),
  },
  (t) => [
    index("audit_events_company").on(t.companyId, t.at),
    index("audit_events_production").on(t.productionId, t.at),
  ],
);
