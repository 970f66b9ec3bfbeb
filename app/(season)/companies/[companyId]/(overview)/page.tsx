import type { Metadata } from "next";
import Link from "next/link";
import { PageTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { Chip } from "@/components/ui/chip";
import { EmptyState } from "@/components/ui/empty-state";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { listCompanyProductions, readCompany } from "@/lib/data/companies";
import { dayOfYear } from "@/lib/format-dates";
import { POSITION_NAMES } from "@/lib/permissions/position-kinds";
import { stageName } from "../../../_components/stage-name";

export const metadata: Metadata = { title: "Company" };

export default async function CompanyPage({ params }: PageProps<"/companies/[companyId]">) {
  const { companyId } = await params;
  const actor = await pageActor(`/companies/${companyId}`);
  const company = await orNotFound(readCompany(actor, companyId));
  const productions = await listCompanyProductions(actor, company.id);
  const create = company.may.create ? (
    <Button asChild kind="primary">
      <Link href={`/productions/new?company=${company.id}`}>New production</Link>
    </Button>
  ) : null;
  return (
    <>
      <PageTitle
        title={company.name}
        sub={`Times are those of ${company.zone.replaceAll("_", " ")}; sheets are printed on ${company.paper}.`}
        {...(create && productions.length > 0 && { actions: create })}
      />
      {productions.length === 0 ? (
        <EmptyState title="No production yet" {...(create && { action: create })}>
          A production has its score, auditions, casting and calls. It begins with a title.
        </EmptyState>
      ) : (
        <ul className="border-t border-rule">
          {productions.map(({ id, title, stage, opensOn, positions }) => (
            <li
              key={id}
              className="grid gap-x-6 gap-y-1 border-b border-rule py-4 sm:grid-cols-[minmax(0,1fr)_auto] sm:items-center"
            >
              <div className="min-w-0">
                <h2 className="text-2xl">
                  <Link
                    href={`/productions/${id}`}
                    className="inline-block py-0.5 text-ink no-underline hover:underline"
                  >
                    <cite className="text-[1em]">{title}</cite>
                  </Link>
                </h2>
                <p className="text-sm text-ink-2">
                  {[
                    opensOn === null ? "No dates yet" : `Opens ${dayOfYear(opensOn)}`,
                    ...positions.map((kind) => `you are ${POSITION_NAMES[kind].toLowerCase()}`),
                  ].join("; ")}
                </p>
              </div>
              <span>
                <Chip tone="info">{stageName(stage)}</Chip>
              </span>
            </li>
          ))}
        </ul>
      )}
    </>
  );
}
