import Link from "next/link";
import type { ReactNode } from "react";
import { cx } from "@/components/ui/cx";
import { KeysNav, type KeyItem } from "./keys-nav";
import { LazyMenu } from "./lazy-menu";
import type { MenuEntry } from "./menu-entry";
import { SkipLink } from "./skip-link";

export type Crumb = { label: string; href?: string };

export type AppFrameProps = {
  children: ReactNode;
  /** Where this page is: company, then production; the last stands out. */
  crumbs?: readonly Crumb[];
  /** Today in the company's zone, written out. */
  today?: string;
  /** The person signed in and what their menu offers. */
  account?: { name: string; initials: string; entries: readonly MenuEntry[] };
  nav?: { label: string; items: readonly KeyItem[] };
  /** Replaces the wordmark in the places of the audition room, for instance "At the piano". */
  name?: string;
  homeHref?: string;
  /** Stands at the right of the header, before the date: a state, or a link to sign in. */
  status?: ReactNode;
  /** Leaves the page its own margins. */
  bare?: boolean;
};

function Crumbs({ crumbs }: { crumbs: readonly Crumb[] }) {
  return (
    <nav aria-label="Where you are" className="min-w-0">
      <ol className="flex min-w-0 items-center gap-2 text-sm text-lid-quiet">
        {crumbs.map((crumb, index) => {
          const last = index === crumbs.length - 1;
          return (
            <li
              key={`${String(index)} ${crumb.label}`}
              className={cx(
                "flex min-w-0 items-center gap-2",
                last ? "font-bold text-lid-text" : "max-sm:hidden",
              )}
            >
              {index > 0 && (
                <span aria-hidden="true" className="font-normal text-lid-quiet max-sm:hidden">
                  /
                </span>
              )}
              {crumb.href === undefined ? (
                <span className="truncate">{crumb.label}</span>
              ) : (
                <Link href={crumb.href} className="truncate py-1.5 no-underline hover:underline">
                  {crumb.label}
                </Link>
              )}
            </li>
          );
        })}
      </ol>
    </nav>
  );
}

/** The lid of the instrument: wordmark, where you are, today, your menu, and the keys. */
export function AppFrame({
  children,
  crumbs = [],
  today,
  account,
  nav,
  name = "Cembalo",
  homeHref = "/",
  status,
  bare = false,
}: AppFrameProps) {
  return (
    <>
      <SkipLink />
      <header className="on-lid border-b-[3px] border-lining bg-lid px-4 text-lid-text md:px-8 print:hidden">
        <div className="flex min-h-14 items-center gap-4">
          <Link
            href={homeHref}
            className="shrink-0 py-1 font-serif text-[1.75rem] leading-none text-lid-text italic no-underline"
          >
            {name}
          </Link>
          {crumbs.length > 0 && <Crumbs crumbs={crumbs} />}
          <div className="ml-auto flex shrink-0 items-center gap-3.5 text-sm text-lid-quiet">
            {status}
            {today !== undefined && <span className="max-md:hidden">{today}</span>}
            {account && (
              <LazyMenu
                label={`Menu of ${account.name}`}
                entries={account.entries}
                triggerClass="-mr-1.5 grid size-11 place-items-center rounded-full"
              >
                <span className="grid size-8 place-items-center rounded-full bg-[#3a332b] text-xs font-bold text-lid-text">
                  {account.initials}
                </span>
              </LazyMenu>
            )}
          </div>
        </div>
        {nav && <KeysNav items={nav.items} label={nav.label} />}
      </header>
      <main
        id="content"
        tabIndex={-1}
        className={cx(
          "outline-none",
          !bare && "mx-auto w-full max-w-[100rem] px-4 pt-8 pb-16 md:px-8 md:pt-11 print:p-0",
          nav && "max-lg:pb-28",
        )}
      >
        {children}
      </main>
    </>
  );
}
