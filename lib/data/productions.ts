import "server-only";
import { and, asc, eq, inArray, isNull, or, sql } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import { companies, people, positions, productions, users } from "@/db/schema";
import { AppError } from "@/lib/errors";
import { can } from "@/lib/permissions/can";
import type { Actor, PositionKind } from "@/lib/permissions/types";
import type {
  changeProductionSchema,
  createCompanySchema,
  createProductionSchema,
} from "@/lib/schemas/productions";
import { recordAudit } from "./audit";
import { companyFor, personIn, productionFor } from "./guard";
import { countTry, RATES } from "./rate-limit";
import { inTransaction } from "./transaction";

/** A new company, with the actor as its admin and as a music director in it. Returns its id. */
export async function createCompany(
  actor: Actor,
  input: z.output<typeof createCompanySchema>,
): Promise<string> {
  await countTry(RATES.companiesOfUser, actor.userId);
  return inTransaction(async (tx) => {
    const companyId = newId();
    const personId = newId();
    await tx.insert(companies).values({ id: companyId, ...input });
    await tx.insert(people).values({
      id: personId,
      companyId,
      userId: actor.userId,
      name: actor.name,
      email: actor.email,
    });
    await tx.insert(positions).values([
      { companyId, personId, kind: "company_admin" },
      { companyId, personId, kind: "music_director" },
    ]);
    await recordAudit(tx, actor, {
      companyId,
      action: "company.create",
      subjectKind: "company",
      subjectId: companyId,
      summary: `Started the company ${input.name}`,
    });
    return companyId;
  });
}

/** A new production of a company, with the actor as its music director. Returns its id. */
export async function createProduction(
  actor: Actor,
  input: z.output<typeof createProductionSchema>,
): Promise<string> {
  const company = await companyFor(actor, input.companyId, "production:create");
  const personId = personIn(actor, company.id);
  return inTransaction(async (tx) => {
    const productionId = newId();
    await tx.insert(productions).values({
      id: productionId,
      companyId: company.id,
      title: input.title,
      opensOn: input.opensOn,
      closesOn: input.closesOn,
    });
    await tx
      .insert(positions)
      .values({ companyId: company.id, personId, productionId, kind: "music_director" });
    await recordAudit(tx, actor, {
      companyId: company.id,
      productionId,
      action: "production.create",
      subjectKind: "production",
      subjectId: productionId,
      summary: `Created the production ${input.title}`,
    });
    return productionId;
  });
}

/** Changes title, stage and dates. Throws `stale` when someone else changed it since `version` was read. */
export async function changeProduction(
  actor: Actor,
  input: z.output<typeof changeProductionSchema>,
): Promise<void> {
  const scope = await productionFor(actor, input.productionId, "production:change");
  await inTransaction(async (tx) => {
    const [result] = await tx
      .update(productions)
      .set({
        title: input.title,
        stage: input.stage,
        opensOn: input.opensOn,
        closesOn: input.closesOn,
        version: sql`${productions.version} + 1`,
      })
      .where(and(eq(productions.id, scope.id), eq(productions.version, input.version)));
    if (result.affectedRows === 0) throw new AppError("stale");
    await recordAudit(tx, actor, {
      companyId: scope.companyId,
      productionId: scope.id,
      action: "production.change",
      subjectKind: "production",
      subjectId: scope.id,
      summary: `Changed ${scope.title}: ${input.title}, ${input.stage}`,
    });
  });
}

export type ProductionListed = {
  id: string;
  title: string;
  companyId: string;
  companyName: string;
  stage: (typeof productions.$inferSelect)["stage"];
  opensOn: string | null;
  closesOn: string | null;
  zone: string;
  /** What the actor does in it; empty for a company admin who only looks on. */
  positions: PositionKind[];
};

/** Every production the actor may see, in all their companies, in order of company and opening. */
export async function listProductions(actor: Actor): Promise<ProductionListed[]> {
  const mine = actor.positions.flatMap((p) => (p.productionId === null ? [] : [p.productionId]));
  const administered = actor.positions.flatMap((p) =>
    p.productionId === null && p.kind === "company_admin" ? [p.companyId] : [],
  );
  if (mine.length === 0 && administered.length === 0) return [];
  const rows = await db
    .select({
      id: productions.id,
      title: productions.title,
      companyId: productions.companyId,
      companyName: companies.name,
      stage: productions.stage,
      opensOn: productions.opensOn,
      closesOn: productions.closesOn,
      zone: companies.zone,
    })
    .from(productions)
    .innerJoin(companies, eq(companies.id, productions.companyId))
    .where(
      and(
        isNull(productions.removedAt),
        or(
          mine.length > 0 ? inArray(productions.id, mine) : undefined,
          administered.length > 0 ? inArray(productions.companyId, administered) : undefined,
        ),
      ),
    )
    .orderBy(asc(companies.name), asc(productions.opensOn), asc(productions.title));
  return rows
    .filter((row) =>
      can(actor, "production:see", { companyId: row.companyId, productionId: row.id }),
    )
    .map((row) => ({
      ...row,
      positions: actor.positions.filter((p) => p.productionId === row.id).map((p) => p.kind),
    }));
}

/** The companies in which the actor may create a production. */
export async function listCompaniesToCreateIn(
  actor: Actor,
): Promise<{ id: string; name: string }[]> {
  const ids = [...new Set(actor.positions.map((p) => p.companyId))].filter((companyId) =>
    can(actor, "production:create", { companyId }),
  );
  if (ids.length === 0) return [];
  return db
    .select({ id: companies.id, name: companies.name })
    .from(companies)
    .where(inArray(companies.id, ids))
    .orderBy(asc(companies.name));
}

/** The companies the actor belongs to. */
export async function listCompanies(
  actor: Actor,
): Promise<{ id: string; name: string; zone: string }[]> {
  const ids = [...new Set(actor.people.map((p) => p.companyId))];
  if (ids.length === 0) return [];
  return db
    .select({ id: companies.id, name: companies.name, zone: companies.zone })
    .from(companies)
    .where(inArray(companies.id, ids))
    .orderBy(asc(companies.name));
}

/** Writes the login's own name, as it greets and signs with. */
export async function renameUser(actor: Actor, name: string): Promise<void> {
  await db.update(users).set({ name }).where(eq(users.id, actor.userId));
}
