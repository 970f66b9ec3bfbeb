import "server-only";
import { and, desc, eq, inArray, isNull, or, sql } from "drizzle-orm";
import { db } from "@/db/client";
import { acknowledgements, callSheetIssues, companies, productions } from "@/db/schema";
import type { CallSheetBlock } from "@/lib/call-sheets/types";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";
import { ownChanges, ownSheet } from "./issues";
import type { IssueSnapshot } from "./issues";

export type OwnSheetListed = {
  issueId: string;
  productionId: string;
  production: string;
  company: string;
  localDate: string;
  number: number;
  issuedAt: Date;
  zone: string;
  /** First needed and free to go, "18:30"; null when the person is not called any more. */
  from: string | null;
  releasedAt: string | null;
  acknowledgedAt: Date | null;
};

export type OwnSheet = OwnSheetListed & {
  blocks: Omit<CallSheetBlock, "who">[];
  /** What changed for this person since the issue before. */
  changed: string[];
  tomorrow: string[];
  notes: string[];
  contact: string | null;
  /** A newer issue of the same day that concerns this person too; null when this is the newest. */
  newer: { issueId: string; number: number } | null;
};

type Mine = { personId: string; productionId: string };

/** In which production the actor is which record; a position that has ended gives nothing. */
function mine(actor: Actor): Mine[] {
  return actor.positions.flatMap(({ personId, productionId }) =>
    productionId === null ? [] : [{ personId, productionId }],
  );
}

/** The newest issue of each day, from `since` (a local day; all unless told) on, that concerns the actor. */
export async function listOwnSheets(
  actor: Actor,
  { since }: { since?: string } = {},
): Promise<OwnSheetListed[]> {
  const rows = await ownIssues(
    actor,
    since === undefined ? undefined : sql`${callSheetIssues.localDate} >= ${since}`,
  );
  const newest = new Map<string, (typeof rows)[number]>();
  for (const row of rows) {
    const day = `${row.listed.productionId} ${row.listed.localDate}`;
    if (!newest.has(day)) newest.set(day, row);
  }
  return [...newest.values()]
    .map((row) => row.listed)
    .sort((a, b) => (a.localDate < b.localDate ? -1 : a.localDate > b.localDate ? 1 : 0));
}

/** One issue cut down to what is the actor's own. Throws `not-found` when it does not concern them. */
export async function readOwnSheet(actor: Actor, issueId: string): Promise<OwnSheet> {
  const [row] = await ownIssues(actor, eq(callSheetIssues.id, issueId));
  if (!row) throw new AppError("not-found");
  const { listed, personId, snapshot } = row;
  const ofDay = await ownIssues(
    actor,
    and(
      eq(callSheetIssues.productionId, listed.productionId),
      eq(callSheetIssues.localDate, listed.localDate),
    ),
  );
  const newer = ofDay.find((other) => other.listed.number > listed.number);
  const before = ofDay.find((other) => other.listed.number < listed.number);
  const sheet = ownSheet(personId, snapshot);
  return {
    ...listed,
    blocks: sheet.blocks.map(({ who: _who, ...block }) => block),
    changed: before ? ownChanges(personId, before.snapshot, snapshot) : [],
    tomorrow: sheet.tomorrow,
    notes: sheet.notes,
    contact: sheet.contact ?? null,
    newer: newer ? { issueId: newer.listed.issueId, number: newer.listed.number } : null,
  };
}

/** The actor has read an issue. Doing it twice changes nothing. Throws `not-found` when it does not concern them. */
export async function acknowledgeSheet(actor: Actor, issueId: string): Promise<void> {
  const [row] = await ownIssues(actor, eq(callSheetIssues.id, issueId));
  if (!row) throw new AppError("not-found");
  await db
    .insert(acknowledgements)
    .values({ issueId, personId: row.personId, at: new Date() })
    .onDuplicateKeyUpdate({ set: { issueId } });
}

async function ownIssues(actor: Actor, where: ReturnType<typeof and>) {
  const own = mine(actor);
  if (own.length === 0) return [];
  const concernsMe = or(
    ...own.map(({ personId, productionId }) =>
      and(
        eq(callSheetIssues.productionId, productionId),
        sql`json_contains(${callSheetIssues.concerns}, json_quote(${personId}))`,
      ),
    ),
  );
  const rows = await db
    .select({
      issueId: callSheetIssues.id,
      productionId: productions.id,
      production: productions.title,
      company: companies.name,
      zone: companies.zone,
      localDate: callSheetIssues.localDate,
      number: callSheetIssues.number,
      issuedAt: callSheetIssues.issuedAt,
      concerns: callSheetIssues.concerns,
      snapshot: callSheetIssues.snapshot,
    })
    .from(callSheetIssues)
    .innerJoin(
      productions,
      and(eq(productions.id, callSheetIssues.productionId), isNull(productions.removedAt)),
    )
    .innerJoin(companies, eq(companies.id, productions.companyId))
    .where(and(concernsMe, where))
    .orderBy(desc(callSheetIssues.number));
  const read =
    rows.length === 0
      ? []
      : await db
          .select({
            issueId: acknowledgements.issueId,
            personId: acknowledgements.personId,
            at: acknowledgements.at,
          })
          .from(acknowledgements)
          .where(
            and(
              inArray(
                acknowledgements.issueId,
                rows.map((row) => row.issueId),
              ),
              inArray(
                acknowledgements.personId,
                own.map(({ personId }) => personId),
              ),
            ),
          );
  return rows.flatMap(({ concerns, snapshot: kept, ...row }) => {
    const snapshot = kept as IssueSnapshot;
    const personId = own.find(
      (me) => me.productionId === row.productionId && concerns.includes(me.personId),
    )?.personId;
    if (personId === undefined) return [];
    const part = snapshot.people[personId];
    const listed: OwnSheetListed = {
      ...row,
      from: part?.from ?? null,
      releasedAt: part?.releasedAt ?? null,
      acknowledgedAt:
        read.find((ack) => ack.issueId === row.issueId && ack.personId === personId)?.at ?? null,
    };
    return [{ personId, snapshot, listed }];
  });
}
