import {
  datetime,
  index,
  int,
  mysqlTable,
  primaryKey,
  text,
  timestamp,
  varchar,
} from "drizzle-orm/mysql-core";
import { exactText, id, uuid } from "../columns";

/** Logins, world-wide. What a company knows of a person is in `people`. */
export const users = mysqlTable("users", {
  id: id(),
  name: varchar("name", { length: 200 }),
  email: exactText("email", { length: 254 }).notNull().unique(),
  emailVerified: timestamp("email_verified", { mode: "date", fsp: 3 }),
  image: varchar("image", { length: 255 }),
  createdAt: datetime("created_at", { mode: "date", fsp: 3 })
    .notNull()
    .$defaultFn(() => new Date()),
});

export const accounts = mysqlTable(
  "accounts",
  {
    userId: uuid("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    type: varchar("type", { length: 255 }).notNull(),
    provider: varchar("provider", { length: 100 }).notNull(),
    providerAccountId: varchar("provider_account_id", { length: 150 }).notNull(),
    refresh_token: text("refresh_token"),
    access_token: text("access_token"),
    expires_at: int("expires_at"),
    token_type: varchar("token_type", { length: 255 }),
    scope: varchar("scope", { length: 255 }),
    id_token: text("id_token"),
    session_state: varchar("session_state", { length: 255 }),
  },
  (t) => [primaryKey({ columns: [t.provider, t.providerAccountId] })],
);

export const sessions = mysqlTable(
  "sessions",
  {
    sessionToken: exactText("session_token", { length: 191 }).primaryKey(),
    userId: uuid("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    expires: timestamp("expires", { mode: "date", fsp: 3 }).notNull(),
    /** What the person recognises a session by in their list. */
    device: varchar("device", { length: 120 }),
    createdAt: datetime("created_at", { mode: "date", fsp: 3 })
      .notNull()
      .$defaultFn(() => new Date()),
  },
  (t) => [index("sessions_user").on(t.userId)],
);

export const verificationTokens = mysqlTable(
  "verification_tokens",
  {
    identifier: exactText("identifier", { length: 254 }).notNull(),
    token: exactText("token", { length: 191 }).notNull(),
    expires: timestamp("expires", { mode: "date", fsp: 3 }).notNull(),
  },
  (t) => [primaryKey({ columns: [t.identifier, t.token] })],
);

export const passwordHashes = mysqlTable("password_hashes", {
  userId: uuid("user_id")
    .primaryKey()
    .references(() => users.id, { onDelete: "cascade" }),
  /** `scrypt$N$r$p$salt$key`, base64url parts. */
  hash: varchar("hash", { length: 255 }).notNull(),
  updatedAt: datetime("updated_at", { mode: "date", fsp: 3 })
    .notNull()
    .$defaultFn(() => new Date()),
});

export const apiTokens = mysqlTable(
  "api_tokens",
  {
    id: id(),
    userId: uuid("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    hash: exactText("hash", { length: 64 }).notNull().unique(),
    label: varchar("label", { length: 80 }).notNull(),
    createdAt: datetime("created_at", { mode: "date", fsp: 3 })
      .notNull()
      .$defaultFn(() => new Date()),
    lastUsedAt: datetime("last_used_at", { mode: "date", fsp: 3 }),
    revokedAt: datetime("revoked_at", { mode: "date", fsp: 3 }),
  },
  (t) => [index("api_tokens_user").on(t.userId)],
);

/** How often something was tried in a window of time; in the database so that several instances share the count. */
export const rateCounters = mysqlTable(
  "rate_counters",
  {
    key: exactText("key", { length: 150 }).notNull(),
    windowStart: datetime("window_start", { mode: "date", fsp: 3 }).notNull(),
    hits: int("hits").notNull().default(0),
  },
  (t) => [primaryKey({ columns: [t.key, t.windowStart] })],
);
