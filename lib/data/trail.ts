import "server-only";
import { and, desc, eq, inArray, isNull, like, notInArray, or } from "drizzle-orm";
import type { SQL } from "drizzle-orm";
import { db } from "@/db/client";
import { auditEvents, productions } from "@/db/schema";
import { AppError } from "@/lib/errors";
import { can } from "@/lib/permissions/can";
import type { Action } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import { companyFor } from "./guard";

const PAGE = 50;

/** What the trail says of these is for those who may see the thing itself. */
const KEPT_FROM_OTHERS: { action: string; needs: Action }[] = [
  { action: "casting.choose", needs: "casting:see" },
  { action: "range.hear", needs: "auditions:read" },
  // Whoever answers was called back.
  { action: "callbacks.answer", needs: "callbacks:read" },
];

export type TrailEvent = {
  id: string;
  who: string;
  what: string;
  production: string | null;
  at: Date;
};

export type Trail = {
  company: { id: string; name: string; zone: string; locale: string };
  /** Null for the whole company. */
  production: { id: string; title: string } | null;
  /** What the actor can choose from. */
  wholeCompany: boolean;
  productions: { id: string; title: string }[];
  events: TrailEvent[];
  page: number;
  hasNext: boolean;
};

export type TrailQuery = {
  companyId: string;
  productionId?: string | undefined;
  text?: string | undefined;
  /** From 1. */
  page?: number | undefined;
};

/**
 * Who changed what, the newest first, fifty a page: of the whole company for its admins, of one production for those who
 * run it. Without a production named, someone who may not read the company's gets their first production's. Throws
 * `not-found` for what is not theirs.
 */
export async function readTrail(actor: Actor, query: TrailQuery): Promise<Trail> {
  const company = await companyFor(actor, query.companyId, "company:see");
  const wholeCompany = can(actor, "trail:read", { companyId: company.id });
  const rows = await db
    .select({
      id: productions.id,
      title: productions.title,
      published: productions.castPublishedAt,
    })
    .from(productions)
    .where(and(eq(productions.companyId, company.id), isNull(productions.removedAt)))
    .orderBy(productions.title);
  const subjectOf = (row: (typeof rows)[number]) => ({
    companyId: company.id,
    productionId: row.id,
    castPublished: row.published !== null,
  });
  const readable = rows.filter((row) => can(actor, "trail:read", subjectOf(row)));
  const production =
    query.productionId === undefined
      ? wholeCompany
        ? null
        : readable[0]
      : readable.find((row) => row.id === query.productionId?.toLowerCase());
  if (production === undefined) throw new AppError("not-found");

  const page = Math.max(1, query.page ?? 1);
  const text = query.text?.trim() ?? "";
  const found = await db
    .select({
      id: auditEvents.id,
      who: auditEvents.actorName,
      what: auditEvents.summary,
      production: productions.title,
      at: auditEvents.at,
    })
    .from(auditEvents)
    .leftJoin(productions, eq(productions.id, auditEvents.productionId))
    .where(
      and(
        eq(auditEvents.companyId, company.id),
        production ? eq(auditEvents.productionId, production.id) : undefined,
        ...KEPT_FROM_OTHERS.map(({ action, needs }) =>
          onlyWhere(
            action,
            rows.filter((row) => can(actor, needs, subjectOf(row))).map((row) => row.id),
          ),
        ),
        text === ""
          ? undefined
          : or(
              like(auditEvents.summary, containing(text)),
              like(auditEvents.actorName, containing(text)),
              like(productions.title, containing(text)),
            ),
      ),
    )
    .orderBy(desc(auditEvents.at), desc(auditEvents.id))
    .limit(PAGE + 1)
    .offset((page - 1) * PAGE);
  return {
    company: { id: company.id, name: company.name, zone: company.zone, locale: company.locale },
    production: production === null ? null : { id: production.id, title: production.title },
    wholeCompany,
    productions: readable.map(({ id, title }) => ({ id, title })),
    events: found.slice(0, PAGE),
    page,
    hasNext: found.length > PAGE,
  };
}

function onlyWhere(action: string, productionIds: string[]): SQL | undefined {
  const others = notInArray(auditEvents.action, [action]);
  return productionIds.length === 0
    ? others
    : or(others, inArray(auditEvents.productionId, productionIds));
}

/** As typed, anywhere in the text: `%` and `_` stand for themselves. */
function containing(text: string): string {
  return `%${text.slice(0, 100).replaceAll(/[\\%_]/g, (sign) => `\\${sign}`)}%`;
}
