import {
  datetime,
  index,
  int,
  mysqlEnum,
  mysqlTable,
  uniqueIndex,
  varchar,
} from "drizzle-orm/mysql-core";
import { id, uuid } from "../columns";
import { people } from "./companies";
import { roles } from "./score";
import { productions } from "./seasons";
import { users } from "./sign-in";

export const CHOICE_KINDS = ["principal", "alternate", "cover", "swing"] as const;

/** A person chosen for a role: only considered, or cast. */
export const choices = mysqlTable(
  "choices",
  {
    id: id(),
    productionId: uuid("production_id")
      .notNull()
      .references(() => productions.id),
    roleId: uuid("role_id")
      .notNull()
      .references(() => roles.id),
    personId: uuid("person_id")
      .notNull()
      .references(() => people.id),
    kind: mysqlEnum("kind", CHOICE_KINDS).notNull().default("principal"),
    state: mysqlEnum("state", ["considered", "cast"]).notNull(),
    note: varchar("note", { length: 400 }),
    chosenBy: uuid("chosen_by").references(() => users.id, { onDelete: "set null" }),
    chosenAt: datetime("chosen_at", { mode: "date", fsp: 3 })
      .notNull()
      .$defaultFn(() => new Date()),
    version: int("version").notNull().default(1),
  },
  (t) => [
    uniqueIndex("choices_once").on(t.roleId, t.personId),
    index("choices_production").on(t.productionId, t.state),
    index("choices_person").on(t.personId),
  ],
);
