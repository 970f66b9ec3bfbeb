import {
  datetime,
  date,
  foreignKey,
  index,
  int,
  json,
  mysqlTable,
  primaryKey,
  uniqueIndex,
} from "drizzle-orm/mysql-core";
import { id, uuid } from "../columns";
import { people } from "./companies";
import { productions } from "./seasons";
import { users } from "./sign-in";

/** A call sheet as it went out: a snapshot, never altered, only followed by the next issue. */
export const callSheetIssues = mysqlTable(
  "call_sheet_issues",
  {
    id: id(),
    productionId: uuid("production_id")
      .notNull()
      .references(() => productions.id),
    localDate: date("local_date", { mode: "string" }).notNull(),
    number: int("number").notNull(),
    issuedAt: datetime("issued_at", { mode: "date", fsp: 3 }).notNull(),
    issuedBy: uuid("issued_by").references(() => users.id, { onDelete: "set null" }),
    snapshot: json("snapshot").$type<Record<string, unknown>>().notNull(),
    /** The people it concerns, by id, so that who must acknowledge is as it was. */
    concerns: json("concerns").$type<string[]>().notNull(),
  },
  (t) => [uniqueIndex("call_sheet_issues_once").on(t.productionId, t.localDate, t.number)],
);

export const acknowledgements = mysqlTable(
  "acknowledgements",
  {
    issueId: uuid("issue_id").notNull(),
    personId: uuid("person_id")
      .notNull()
      .references(() => people.id),
    at: datetime("at", { mode: "date", fsp: 3 }).notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.issueId, t.personId] }),
    index("acknowledgements_person").on(t.personId),
    foreignKey({
      name: "acknowledgements_issue_fk",
      columns: [t.issueId],
      foreignColumns: [callSheetIssues.id],
    }),
  ],
);
