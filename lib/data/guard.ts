import "server-only";
import { and, eq, isNull } from "drizzle-orm";
import { cache } from "react";
import { db } from "@/db/client";
import { companies, productions } from "@/db/schema";
import { AppError } from "@/lib/errors";
import { can } from "@/lib/permissions/can";
import type { Action } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";

export type ProductionScope = {
  id: string;
  companyId: string;
  companyName: string;
  title: string;
  stage: (typeof productions.$inferSelect)["stage"];
  zone: string;
  locale: string;
  paper: "A4" | "Letter";
  opensOn: string | null;
  closesOn: string | null;
  castPublished: boolean;
  version: number;
};

// Layout, page and data functions of one page ask for the same production: it is read once a request.
const loadProduction = cache(async (productionId: string) => {
  const [row] = await db
    .select({
      id: productions.id,
      companyId: productions.companyId,
      companyName: companies.name,
      title: productions.title,
      stage: productions.stage,
      zone: companies.zone,
      locale: companies.locale,
      paper: companies.paper,
      opensOn: productions.opensOn,
      closesOn: productions.closesOn,
      castPublishedAt: productions.castPublishedAt,
      version: productions.version,
    })
    .from(productions)
    .innerJoin(companies, eq(companies.id, productions.companyId))
    .where(and(eq(productions.id, productionId), isNull(productions.removedAt)));
  return row;
});

/**
 * The production, if the actor may do this in it: the first line of every function that works in a production.
 * Throws `not-found` when it does not exist or is not theirs to know of (the two must look the same), and
 * `not-allowed` when they know of it but may not do this.
 */
export async function productionFor(
  actor: Actor,
  productionId: string,
  action: Action,
): Promise<ProductionScope> {
  const row = await loadProduction(productionId);
  if (!row) throw new AppError("not-found");
  const { castPublishedAt, ...rest } = row;
  const scope = { ...rest, castPublished: castPublishedAt !== null };
  const subject = {
    companyId: row.companyId,
    productionId: row.id,
    castPublished: scope.castPublished,
  };
  if (!can(actor, "production:see", subject)) throw new AppError("not-found");
  if (!can(actor, action, subject)) throw new AppError("not-allowed");
  return scope;
}

/** The same for what belongs to a company as a whole. */
export async function companyFor(
  actor: Actor,
  companyId: string,
  action: Action,
): Promise<{ id: string; name: string; zone: string; locale: string; paper: "A4" | "Letter" }> {
  const [row] = await db
    .select({
      id: companies.id,
      name: companies.name,
      zone: companies.zone,
      locale: companies.locale,
      paper: companies.paper,
    })
    .from(companies)
    .where(eq(companies.id, companyId));
  if (!row || !can(actor, "company:see", { companyId })) throw new AppError("not-found");
  if (!can(actor, action, { companyId })) throw new AppError("not-allowed");
  return row;
}

/** The company's record of this actor. Throws `not-found` when the company has none. */
export function personIn(actor: Actor, companyId: string): string {
  const person = actor.people.find((p) => p.companyId === companyId);
  if (!person) throw new AppError("not-found");
  return person.id;
}

/** Throws `not-found` unless this record is the actor's own. */
export function assertOwn(actor: Actor, personId: string): void {
  if (!actor.people.some((p) => p.id === personId)) throw new AppError("not-found");
}
