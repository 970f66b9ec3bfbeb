import { accountOf } from "@/app/_frame/account";
import { signOut } from "@/app/_frame/actions";
import { AppFrame } from "@/components/layout/app-frame";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { productionFor } from "@/lib/data/guard";
import { localDay, longDay } from "@/lib/format-dates";
import { can } from "@/lib/permissions/can";
import type { Action } from "@/lib/permissions/can";

const KEYS: { label: string; area: string; action: Action }[] = [
  { label: "Score", area: "score", action: "score:read" },
  { label: "Auditions", area: "auditions", action: "auditions:read" },
  { label: "Callbacks", area: "callbacks", action: "callbacks:read" },
  { label: "Casting", area: "casting", action: "casting:see" },
  { label: "Rehearsals", area: "rehearsals", action: "calls:read" },
  { label: "Pianists", area: "pianists", action: "pianists:see" },
  { label: "Call sheets", area: "call-sheets", action: "sheets:read" },
  { label: "People", area: "people", action: "people:read" },
];

/** The frame of a production: only the keys this person may press. Each page asks permission for itself. */
export default async function ProductionLayout({
  children,
  params,
}: LayoutProps<"/productions/[productionId]">) {
  const { productionId } = await params;
  const actor = await pageActor(`/productions/${productionId}`);
  const production = await orNotFound(productionFor(actor, productionId, "production:see"));
  const subject = {
    companyId: production.companyId,
    productionId,
    castPublished: production.castPublished,
  };
  const items = KEYS.filter((key) => can(actor, key.action, subject)).map((key) => ({
    label: key.label,
    href: `/productions/${productionId}/${key.area}`,
  }));
  return (
    <AppFrame
      homeHref="/season"
      crumbs={[
        { label: production.companyName, href: `/companies/${production.companyId}` },
        { label: production.title, href: `/productions/${productionId}` },
      ]}
      today={longDay(localDay(new Date(), production.zone), production.locale)}
      account={accountOf(actor, signOut)}
      {...(items.length > 0 && { nav: { label: "Production", items } })}
    >
      {children}
    </AppFrame>
  );
}
