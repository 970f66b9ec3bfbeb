import "server-only";
import { AppError } from "@/lib/errors";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import { companyFor } from "./guard";
import { listCompanies } from "./productions";
import { listSeasonProductions } from "./season";
import type { SeasonProduction } from "./season/types";

/** What the actor may open in a company. */
export type CompanyMay = { create: boolean; members: boolean; rooms: boolean; trail: boolean };

type CompanyShown = {
  id: string;
  name: string;
  zone: string;
  locale: string;
  paper: "A4" | "Letter";
  may: CompanyMay;
};

/**
 * The company, for those who work on a production of it or look after the company itself. Throws `not-found` for
 * everyone else: actors and accompanists have pages of their own.
 */
export async function readCompany(actor: Actor, companyId: string): Promise<CompanyShown> {
  const company = await companyFor(actor, companyId, "company:see");
  if (!runsCompany(actor, companyId)) throw new AppError("not-found");
  return { ...company, may: mayInCompany(actor, companyId) };
}

/** The companies the actor may enter, by name. */
export async function listCompaniesRun(
  actor: Actor,
): Promise<{ id: string; name: string; zone: string; may: CompanyMay }[]> {
  const all = await listCompanies(actor);
  return all
    .filter((company) => runsCompany(actor, company.id))
    .map((company) => ({ ...company, may: mayInCompany(actor, company.id) }));
}

/** The productions of the company whose calls the actor may read. */
export async function listCompanyProductions(
  actor: Actor,
  companyId: string,
): Promise<SeasonProduction[]> {
  const company = await readCompany(actor, companyId);
  const all = await listSeasonProductions(actor);
  return all.filter((production) => production.companyId === company.id);
}

function runsCompany(actor: Actor, companyId: string): boolean {
  return (
    can(actor, "rooms:manage", { companyId }) ||
    actor.positions.some((position) =>
      can(actor, "calls:read", {
        companyId,
        ...(position.productionId === null ? {} : { productionId: position.productionId }),
      }),
    )
  );
}

function mayInCompany(actor: Actor, companyId: string): CompanyMay {
  return {
    create: can(actor, "production:create", { companyId }),
    members: can(actor, "members:manage", { companyId }),
    rooms: can(actor, "rooms:manage", { companyId }),
    trail:
      can(actor, "trail:read", { companyId }) ||
      actor.positions.some(
        (position) =>
          position.productionId !== null &&
          can(actor, "trail:read", { companyId, productionId: position.productionId }),
      ),
  };
}
