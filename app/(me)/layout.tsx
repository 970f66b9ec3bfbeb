import type { ReactNode } from "react";
import { accountOf } from "@/app/_frame/account";
import { signOut } from "@/app/_frame/actions";
import { firstPage, seesPlans } from "@/app/_frame/first-page";
import { AppFrame } from "@/components/layout/app-frame";
import { getActor } from "@/lib/auth/get-actor";

/** Everyone's own frame: the keys that concern this person. Each page asks who it is for itself. */
export default async function MeLayout({ children }: { children: ReactNode }) {
  const actor = await getActor();
  if (!actor) return <AppFrame>{children}</AppFrame>;
  const holds = (kind: string): boolean =>
    actor.positions.some((position) => position.kind === kind);
  const items = [
    { label: "My page", href: "/me", exact: true },
    ...(actor.people.length > 0 ? [{ label: "Dates", href: "/me/conflicts" }] : []),
    ...(holds("actor") ? [{ label: "Range", href: "/me/range" }] : []),
    ...(holds("accompanist") ? [{ label: "Sessions", href: "/me/sessions" }] : []),
    ...(seesPlans(actor) ? [{ label: "Season", href: "/season" }] : []),
  ];
  return (
    <AppFrame
      homeHref={firstPage(actor)}
      account={accountOf(actor, signOut)}
      nav={{ label: "My own", items }}
    >
      <div className="mx-auto w-full max-w-2xl">{children}</div>
    </AppFrame>
  );
}
