import "server-only";
import { and, asc, desc, eq, inArray, sql } from "drizzle-orm";
import { db } from "@/db/client";
import { acknowledgements, calls, callSheetIssues, people, users } from "@/db/schema";
import type { CallSheet } from "@/lib/call-sheets/types";
import { productionFor } from "@/lib/data/guard";
import { AppError } from "@/lib/errors";
import { groupBy } from "@/lib/group-by";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import type { IssueSnapshot } from "./issues";

export type IssueListed = {
  id: string;
  number: number;
  issuedAt: Date;
  concerns: number;
  acknowledged: number;
};

export type SheetDayListed = {
  localDate: string;
  published: number;
  drafts: number;
  issues: IssueListed[];
};

/** The production's days that have a call or an issue, with their issues, the newest day last. */
export async function listSheetDays(
  actor: Actor,
  productionId: string,
): Promise<{ days: SheetDayListed[]; zone: string; locale: string; mayIssue: boolean }> {
  const scope = await productionFor(actor, productionId, "sheets:read");
  const mayIssue = can(actor, "sheets:issue", {
    companyId: scope.companyId,
    productionId: scope.id,
  });
  const count = (state: "published" | "draft") =>
    sql<number>`coalesce(sum(${calls.state} = ${state}), 0)`.mapWith(Number);
  const [called, issues] = await Promise.all([
    db
      .select({ localDate: calls.localDate, published: count("published"), drafts: count("draft") })
      .from(calls)
      .where(
        and(
          eq(calls.productionId, scope.id),
          inArray(calls.state, mayIssue ? ["published", "draft"] : ["published"]),
        ),
      )
      .groupBy(calls.localDate),
    listIssues(eq(callSheetIssues.productionId, scope.id)),
  ]);
  const byDay = groupBy(issues, (issue) => issue.localDate);
  const dates = [...new Set([...called.map((day) => day.localDate), ...byDay.keys()])].sort();
  return {
    zone: scope.zone,
    locale: scope.locale,
    mayIssue,
    days: dates.map((localDate) => {
      const day = called.find((row) => row.localDate === localDate);
      return {
        localDate,
        published: day?.published ?? 0,
        drafts: day?.drafts ?? 0,
        issues: byDay.get(localDate) ?? [],
      };
    }),
  };
}

async function listIssues(where: ReturnType<typeof eq>) {
  return db
    .select({
      id: callSheetIssues.id,
      localDate: callSheetIssues.localDate,
      number: callSheetIssues.number,
      issuedAt: callSheetIssues.issuedAt,
      concerns: sql<number>`json_length(${callSheetIssues.concerns})`.mapWith(Number),
      acknowledged: db.$count(acknowledgements, eq(acknowledgements.issueId, callSheetIssues.id)),
    })
    .from(callSheetIssues)
    .where(where)
    .orderBy(asc(callSheetIssues.localDate), desc(callSheetIssues.number));
}

export type IssueRead = {
  id: string;
  sheet: CallSheet;
  issuedAt: Date;
  issuedBy: string | null;
  /** A newer issue of the same day, when there is one. */
  newest: { id: string; number: number };
  paper: "A4" | "Letter";
  zone: string;
  locale: string;
  maySeeWhoRead: boolean;
};

/** One issue, as it went out. Throws `not-found` for another production's. */
export async function readIssue(
  actor: Actor,
  { productionId, issueId }: { productionId: string; issueId: string },
): Promise<IssueRead> {
  const scope = await productionFor(actor, productionId, "sheets:read");
  const [row] = await db
    .select({
      id: callSheetIssues.id,
      localDate: callSheetIssues.localDate,
      issuedAt: callSheetIssues.issuedAt,
      snapshot: callSheetIssues.snapshot,
      issuedBy: users.name,
    })
    .from(callSheetIssues)
    .leftJoin(users, eq(users.id, callSheetIssues.issuedBy))
    .where(and(eq(callSheetIssues.id, issueId), eq(callSheetIssues.productionId, scope.id)));
  if (!row) throw new AppError("not-found");
  const { sheet } = row.snapshot as IssueSnapshot;
  const [newest] = await db
    .select({ id: callSheetIssues.id, number: callSheetIssues.number })
    .from(callSheetIssues)
    .where(
      and(eq(callSheetIssues.productionId, scope.id), eq(callSheetIssues.localDate, row.localDate)),
    )
    .orderBy(desc(callSheetIssues.number))
    .limit(1);
  return {
    id: row.id,
    sheet,
    issuedAt: row.issuedAt,
    issuedBy: row.issuedBy,
    newest: newest ?? { id: row.id, number: sheet.issueNumber },
    paper: scope.paper,
    zone: scope.zone,
    locale: scope.locale,
    maySeeWhoRead: can(actor, "sheets:issue", {
      companyId: scope.companyId,
      productionId: scope.id,
    }),
  };
}

export type Acknowledged = { personId: string; name: string; at: string | null };

/** Who of those an issue concerns has acknowledged it, and who has not (first). For those who issue. */
export async function listAcknowledgements(
  actor: Actor,
  { productionId, issueId }: { productionId: string; issueId: string },
): Promise<Acknowledged[]> {
  const scope = await productionFor(actor, productionId, "sheets:issue");
  const [issue] = await db
    .select({ concerns: callSheetIssues.concerns })
    .from(callSheetIssues)
    .where(and(eq(callSheetIssues.id, issueId), eq(callSheetIssues.productionId, scope.id)));
  if (!issue) throw new AppError("not-found");
  if (issue.concerns.length === 0) return [];
  const rows = await db
    .select({ personId: people.id, name: people.name, at: acknowledgements.at })
    .from(people)
    .leftJoin(
      acknowledgements,
      and(eq(acknowledgements.personId, people.id), eq(acknowledgements.issueId, issueId)),
    )
    .where(and(inArray(people.id, issue.concerns), eq(people.companyId, scope.companyId)))
    .orderBy(sql`${acknowledgements.at} is not null`, asc(people.name));
  return rows.map((row) => ({ ...row, at: row.at?.toISOString() ?? null }));
}
