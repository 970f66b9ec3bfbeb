import { sql } from "drizzle-orm";
import {
  boolean,
  date,
  datetime,
  foreignKey,
  index,
  mysqlEnum,
  mysqlTable,
  uniqueIndex,
  varchar,
} from "drizzle-orm/mysql-core";
import { POSITION_KINDS } from "@/lib/permissions/position-kinds";
import { exactText, id, uuid } from "../columns";
import { productions } from "./seasons";
import { users } from "./sign-in";

export const companies = mysqlTable("companies", {
  id: id(),
  name: varchar("name", { length: 160 }).notNull(),
  zone: varchar("zone", { length: 64 }).notNull(),
  locale: varchar("locale", { length: 20 }).notNull().default("en-GB"),
  paper: mysqlEnum("paper", ["A4", "Letter"]).notNull().default("A4"),
  createdAt: datetime("created_at", { mode: "date", fsp: 3 })
    .notNull()
    .$defaultFn(() => new Date()),
});

/** A company's own record of a person; `userId` is set when that person accepts, signed in with that address. */
export const people = mysqlTable(
  "people",
  {
    id: id(),
    companyId: uuid("company_id")
      .notNull()
      .references(() => companies.id),
    userId: uuid("user_id").references(() => users.id, { onDelete: "set null" }),
    name: varchar("name", { length: 160 }).notNull(),
    email: exactText("email", { length: 254 }),
    phone: varchar("phone", { length: 40 }),
    pronouns: varchar("pronouns", { length: 40 }),
    minor: boolean("minor").notNull().default(false),
    guardianName: varchar("guardian_name", { length: 160 }),
    guardianEmail: varchar("guardian_email", { length: 254 }),
    createdAt: datetime("created_at", { mode: "date", fsp: 3 })
      .notNull()
      .$defaultFn(() => new Date()),
    removedAt: datetime("removed_at", { mode: "date", fsp: 3 }),
  },
  (t) => [
    uniqueIndex("people_company_email").on(t.companyId, t.email),
    uniqueIndex("people_company_user").on(t.companyId, t.userId),
    index("people_user").on(t.userId),
  ],
);

/** What a person does, in one production or (production null) in the company. Open while `endedAt` is null. */
export const positions = mysqlTable(
  "positions",
  {
    id: id(),
    companyId: uuid("company_id")
      .notNull()
      .references(() => companies.id),
    personId: uuid("person_id")
      .notNull()
      .references(() => people.id),
    productionId: uuid("production_id"),
    kind: mysqlEnum("kind", POSITION_KINDS).notNull(),
    startsOn: date("starts_on", { mode: "string" }),
    endedAt: datetime("ended_at", { mode: "date", fsp: 3 }),
    createdAt: datetime("created_at", { mode: "date", fsp: 3 })
      .notNull()
      .$defaultFn(() => new Date()),
    /** The scope while open, null once ended: makes "the same position twice" impossible, a second term possible. */
    openScope: uuid("open_scope").generatedAlwaysAs(
      sql`(if(\`ended_at\` is null, ifnull(\`production_id\`, \`company_id\`), null))`,
      { mode: "virtual" },
    ),
  },
  (t) => [
    uniqueIndex("positions_open").on(t.personId, t.kind, t.openScope),
    index("positions_production").on(t.productionId, t.kind),
    foreignKey({
      name: "positions_production_fk",
      columns: [t.productionId],
      foreignColumns: [productions.id],
    }),
  ],
);

export const invitations = mysqlTable(
  "invitations",
  {
    id: id(),
    positionId: uuid("position_id")
      .notNull()
      .references(() => positions.id, { onDelete: "cascade" }),
    email: exactText("email", { length: 254 }).notNull(),
    tokenHash: exactText("token_hash", { length: 64 }).notNull().unique(),
    invitedBy: uuid("invited_by").references(() => users.id, { onDelete: "set null" }),
    expiresAt: datetime("expires_at", { mode: "date", fsp: 3 }).notNull(),
    acceptedAt: datetime("accepted_at", { mode: "date", fsp: 3 }),
    createdAt: datetime("created_at", { mode: "date", fsp: 3 })
      .notNull()
      .$defaultFn(() => new Date()),
  },
  (t) => [index("invitations_position").on(t.positionId)],
);
