import "server-only";
import { createHash } from "node:crypto";
import { and, asc, desc, eq, inArray, isNull, max, sql } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import type { Db, Tx } from "@/db/client";
import { newId } from "@/db/columns";
import { callSheetIssues, calls, people, positions, productions } from "@/db/schema";
import { callSheetChanges } from "@/lib/call-sheets/call-sheet-changes";
import type { CallSheet } from "@/lib/call-sheets/types";
import { recordAudit } from "@/lib/data/audit";
import { productionFor } from "@/lib/data/guard";
import type { ProductionScope } from "@/lib/data/guard";
import { makeInvitationLink } from "@/lib/data/invitations";
import { queueMail } from "@/lib/data/outbox";
import { inTransaction } from "@/lib/data/transaction";
import { env } from "@/lib/env";
import { AppError } from "@/lib/errors";
import { clock, localDay, longDay, shortDay } from "@/lib/format-dates";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import type { issueSheetSchema } from "@/lib/schemas/sheets";
import { composeSheet } from "./compose";
import type { ComposedSheet, OwnPart } from "./compose";

/** What is kept of an issue: the sheet as it went out, and each person's part of it by id. */
export type IssueSnapshot = { sheet: CallSheet; people: Record<string, OwnPart> };

export type LastIssue = {
  id: string;
  number: number;
  issuedAt: Date;
  concerns: string[];
  snapshot: IssueSnapshot;
};

/** The newest issue of a day, or null. Asks no permission: the caller has. */
export async function lastIssue(
  productionId: string,
  localDate: string,
): Promise<LastIssue | null> {
  const [row] = await db
    .select({
      id: callSheetIssues.id,
      number: callSheetIssues.number,
      issuedAt: callSheetIssues.issuedAt,
      concerns: callSheetIssues.concerns,
      snapshot: callSheetIssues.snapshot,
    })
    .from(callSheetIssues)
    .where(
      and(eq(callSheetIssues.productionId, productionId), eq(callSheetIssues.localDate, localDate)),
    )
    .orderBy(desc(callSheetIssues.number))
    .limit(1);
  return row ? { ...row, snapshot: row.snapshot as IssueSnapshot } : null;
}

export type SheetDay = {
  sheet: CallSheet;
  /** Names the sheet as it was seen: sent back on issuing. */
  seen: string;
  /** Whether it differs from the last issue in anything that is printed. */
  fresh: boolean;
  concerns: number;
  last: { id: string; number: number; issuedAt: Date } | null;
  mayIssue: boolean;
  locale: string;
};

/** The sheet of a local day as it would go out now, with what changed since the last issue. */
export async function readSheetDay(
  actor: Actor,
  { productionId, localDate }: { productionId: string; localDate: string },
): Promise<SheetDay> {
  const scope = await productionFor(actor, productionId, "sheets:read");
  const [composed, last] = await Promise.all([
    composeSheet(scope, localDate),
    lastIssue(scope.id, localDate),
  ]);
  const sheet = finishSheet(composed, last, new Date(), scope);
  return {
    sheet,
    seen: digest(composed, last),
    fresh: last === null || isFresh(composed, last, []),
    concerns: concernedBy(composed, last).length,
    last: last && { id: last.id, number: last.number, issuedAt: last.issuedAt },
    mayIssue: can(actor, "sheets:issue", { companyId: scope.companyId, productionId: scope.id }),
    locale: scope.locale,
  };
}

/**
 * Issues the day's sheet: a numbered snapshot, never altered afterwards, and a message to everyone it concerns (also to
 * people the issue before called and this one does not). Throws `stale` when a call or another issue came in between,
 * `refused` when there is nothing to send.
 */
export async function issueSheet(
  actor: Actor,
  input: z.output<typeof issueSheetSchema>,
): Promise<{ issueId: string; number: number; told: number }> {
  const scope = await productionFor(actor, input.productionId, "sheets:issue");
  const before = await standingCalls(db, scope.id, input.localDate);
  const [bare, last] = await Promise.all([
    composeSheet(scope, input.localDate),
    lastIssue(scope.id, input.localDate),
  ]);
  if (digest(bare, last) !== input.seen) throw new AppError("stale", CHANGED);
  if (bare.sheet.blocks.length === 0 && last === null)
    throw new AppError("refused", "Nothing is called on this day. Publish a call first.");
  if (last !== null && !isFresh(bare, last, input.notes))
    throw new AppError(
      "refused",
      `Nothing changed since issue ${last.number}. Everyone has this already.`,
    );
  const composed = {
    ...bare,
    sheet: { ...bare.sheet, notes: [...bare.sheet.notes, ...input.notes] },
  };
  return inTransaction(async (tx) => {
    // One issue at a time: the production's row is the queue. What was composed must still be how things stand.
    await tx
      .select({ id: productions.id })
      .from(productions)
      .where(eq(productions.id, scope.id))
      .for("update");
    const number = await lastNumber(tx, scope.id, input.localDate);
    const standing = await standingCalls(tx, scope.id, input.localDate);
    if (number !== (last?.number ?? 0) || standing !== before) throw new AppError("stale", CHANGED);
    const issuedAt = new Date();
    const sheet = finishSheet(composed, last, issuedAt, scope);
    const issueId = newId();
    const concerns = concernedBy(composed, last);
    await tx.insert(callSheetIssues).values({
      id: issueId,
      productionId: scope.id,
      localDate: input.localDate,
      number: sheet.issueNumber,
      issuedAt,
      issuedBy: actor.userId,
      snapshot: { sheet, people: composed.people } satisfies IssueSnapshot,
      concerns,
    });
    const told = await mailSheet(tx, actor, scope, { issueId, sheet, composed, last, concerns });
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "sheet.issue",
      subjectKind: "call_sheet",
      subjectId: issueId,
      summary: `Issued the call sheet of ${shortDay(input.localDate)}, issue ${sheet.issueNumber}, to ${concerns.length}`,
    });
    return { issueId, number: sheet.issueNumber, told };
  });
}

const CHANGED =
  "The calls of this day changed while you were looking. Look at the sheet again, then issue it.";

/** Names how the published calls of a day stand: two equal texts are the same calls in the same versions. */
async function standingCalls(
  tx: Db | Tx,
  productionId: string,
  localDate: string,
): Promise<string> {
  const rows = await tx
    .select({ id: calls.id, version: calls.version })
    .from(calls)
    .where(
      and(
        eq(calls.productionId, productionId),
        eq(calls.localDate, localDate),
        eq(calls.state, "published"),
      ),
    )
    .orderBy(asc(calls.id));
  return JSON.stringify(rows);
}

async function lastNumber(tx: Tx, productionId: string, localDate: string): Promise<number> {
  const [row] = await tx
    .select({ number: max(callSheetIssues.number) })
    .from(callSheetIssues)
    .where(
      and(eq(callSheetIssues.productionId, productionId), eq(callSheetIssues.localDate, localDate)),
    );
  return row?.number ?? 0;
}

function finishSheet(
  composed: ComposedSheet,
  last: LastIssue | null,
  issuedAt: Date,
  scope: ProductionScope,
): CallSheet {
  const bare: CallSheet = {
    ...composed.sheet,
    issueNumber: (last?.number ?? 0) + 1,
    issuedAt: issuedAt.toISOString(),
    changed: [],
  };
  if (last === null) return bare;
  return {
    ...bare,
    replaces: `the one of ${sentAt(last.issuedAt, scope)}`,
    changed: callSheetChanges(last.snapshot.sheet, bare),
  };
}

/** "12:05" today, "Mon 5 Apr, 12:05" on another day. */
function sentAt(at: Date, scope: ProductionScope): string {
  const day = localDay(at, scope.zone);
  return day === localDay(new Date(), scope.zone)
    ? clock(at, scope.zone)
    : `${shortDay(day, scope.locale)}, ${clock(at, scope.zone)}`;
}

function digest(composed: ComposedSheet, last: LastIssue | null): string {
  return createHash("sha256")
    .update(JSON.stringify([composed.sheet, composed.people, last?.number ?? 0]))
    .digest("hex");
}

function isFresh(composed: ComposedSheet, last: LastIssue, notes: string[]): boolean {
  const printed = ({
    blocks,
    released,
    music,
    tomorrow,
    away,
    contact,
  }: ComposedSheet["sheet"]): string =>
    JSON.stringify([blocks, released, music, tomorrow, away, contact]);
  // The notes of the last issue were typed for it: an empty box repeats nothing and takes nothing back.
  const said = notes.some((note) => !last.snapshot.sheet.notes.includes(note));
  return said || printed(composed.sheet) !== printed(last.snapshot.sheet);
}

function concernedBy(composed: ComposedSheet, last: LastIssue | null): string[] {
  return [
    ...new Set([...Object.keys(composed.people), ...Object.keys(last?.snapshot.people ?? {})]),
  ];
}

/** What changed for one person only: the changes between the two sheets cut down to their blocks and their name. */
export function ownChanges(
  personId: string,
  before: IssueSnapshot,
  after: IssueSnapshot,
): string[] {
  return callSheetChanges(ownSheet(personId, before), ownSheet(personId, after));
}

/** A sheet cut down to one person: their blocks and the next calls they are in, with nobody else's name. */
export function ownSheet(personId: string, { sheet, people: parts }: IssueSnapshot): CallSheet {
  const part = parts[personId];
  const mine = new Set(part?.blockIds);
  return {
    ...sheet,
    changed: [],
    blocks: sheet.blocks
      .filter((block) => block.id !== undefined && mine.has(block.id))
      .map((block) => ({
        ...block,
        who: part && block.who.includes(part.name) ? [part.name] : [],
      })),
    released: part ? [{ who: part.name, at: part.releasedAt }] : [],
    tomorrow: part?.tomorrow ?? [],
    away: [],
  };
}

async function mailSheet(
  tx: Tx,
  actor: Actor,
  scope: ProductionScope,
  issue: {
    issueId: string;
    sheet: CallSheet;
    composed: ComposedSheet;
    last: LastIssue | null;
    concerns: string[];
  },
): Promise<number> {
  if (issue.concerns.length === 0) return 0;
  const rows = await tx
    .select({
      id: people.id,
      name: people.name,
      email: people.email,
      userId: people.userId,
      positionId: sql<string>`min(${positions.id})`.mapWith(positions.id),
    })
    .from(people)
    .innerJoin(
      positions,
      and(
        eq(positions.personId, people.id),
        eq(positions.productionId, scope.id),
        isNull(positions.endedAt),
      ),
    )
    .where(and(inArray(people.id, issue.concerns), isNull(people.removedAt)))
    .groupBy(people.id, people.name, people.email, people.userId)
    .orderBy(asc(people.name));
  let told = 0;
  for (const person of rows) {
    if (person.email === null) continue;
    const after = { sheet: issue.sheet, people: issue.composed.people };
    const to = `/me/call-sheets/${issue.issueId}`;
    const link =
      person.userId === null
        ? await makeInvitationLink(tx, actor, {
            positionId: person.positionId,
            email: person.email,
            to,
          })
        : new URL(to, env().AUTH_URL).toString();
    await queueMail(tx, {
      companyId: scope.companyId,
      to: person.email,
      template: "call-sheet",
      data: {
        name: person.name,
        production: scope.title,
        day: longDay(issue.sheet.localDate, scope.locale),
        number: issue.sheet.issueNumber,
        changes: issue.last === null ? [] : ownChanges(person.id, issue.last.snapshot, after),
        link,
      },
      dedupeKey: `call-sheet:${issue.issueId}:${person.id}`,
    });
    told += 1;
  }
  return told;
}
