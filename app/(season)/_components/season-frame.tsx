import type { ReactNode } from "react";
import { accountOf } from "@/app/_frame/account";
import { signOut } from "@/app/_frame/actions";
import { AppFrame } from "@/components/layout/app-frame";
import type { Crumb } from "@/components/layout/app-frame";
import type { KeyItem } from "@/components/layout/keys-nav";
import { listCompaniesRun } from "@/lib/data/companies";
import type { CompanyMay } from "@/lib/data/companies";
import { localDay, longDay } from "@/lib/format-dates";
import type { Actor } from "@/lib/permissions/types";

type CompanyKey = { id: string; name: string; zone: string; may: CompanyMay };

/**
 * The frame of a season and of a company. Whoever works for one company has its keys beside the season; whoever works
 * for several finds them under "Companies", and a company's keys once inside it.
 */
export async function SeasonFrame({
  actor,
  company,
  crumbs = [],
  children,
}: {
  actor: Actor;
  company?: CompanyKey;
  crumbs?: readonly Crumb[];
  children: ReactNode;
}) {
  const companies = await listCompaniesRun(actor);
  const shown = company ?? (companies.length === 1 ? companies[0] : undefined);
  const items: KeyItem[] = [
    { label: "Season", href: "/season" },
    ...(shown
      ? companyKeys(shown)
      : companies.length > 1
        ? [{ label: "Companies", href: "/companies" }]
        : []),
  ];
  const zone = shown?.zone ?? companies[0]?.zone;
  return (
    <AppFrame
      homeHref="/season"
      crumbs={crumbs}
      {...(zone !== undefined && { today: longDay(localDay(new Date(), zone)) })}
      account={accountOf(actor, signOut)}
      {...(items.length > 1 && { nav: { label: company ? "Company" : "Season", items } })}
    >
      {children}
    </AppFrame>
  );
}

function companyKeys({ id, may }: CompanyKey): KeyItem[] {
  const home = `/companies/${id}`;
  return [
    { label: "Productions", href: home, exact: true },
    ...(may.members ? [{ label: "People", href: `${home}/people` }] : []),
    ...(may.rooms ? [{ label: "Rooms", href: `${home}/rooms` }] : []),
    ...(may.trail ? [{ label: "Trail", href: `${home}/trail` }] : []),
  ];
}
