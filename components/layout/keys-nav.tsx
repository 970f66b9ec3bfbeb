"use client";

import type { Route } from "next";
import Link from "next/link";
import { usePathname } from "next/navigation";
import { cx } from "@/components/ui/cx";
import { LazyMenu } from "./lazy-menu";

export type KeyItem = {
  href: string;
  label: string;
  /** In use only on this very address, not on those under it. */
  exact?: boolean;
};

export type KeysNavProps = {
  items: readonly KeyItem[];
  /** Names the navigation, for instance "Production". */
  label: string;
};

/** The item whose address is the longest beginning of the page's own. */
export function keyInUse(items: readonly KeyItem[], pathname: string): KeyItem | undefined {
  return items
    .filter(({ href, exact }) =>
      exact ? pathname === href : pathname === href || pathname.startsWith(`${href}/`),
    )
    .toSorted((a, b) => b.href.length - a.href.length)[0];
}

// Where an octave has a sharp after its natural: C D · F G A, none after E and B.
const SHARP_AFTER = [true, true, false, true, true, true, false];
const hasSharp = (index: number, count: number) =>
  index < count - 1 && SHARP_AFTER[index % SHARP_AFTER.length] === true;

const sharp =
  "after:pointer-events-none after:absolute after:top-0 after:-right-[8px] after:z-20 after:h-[14px] after:w-[14px] after:rounded-b-[2px] after:bg-linear-to-b after:from-lid-quiet after:to-sharp after:content-['']";

function WideKeys({ items, label, current }: KeysNavProps & { current: KeyItem | undefined }) {
  return (
    <nav aria-label={label} className="relative z-10 -mb-[9px] hidden lg:block">
      <ul className="flex gap-[2px]">
        {items.map((item, index) => {
          const pressed = item === current;
          return (
            <li key={item.href} className={cx("relative", hasSharp(index, items.length) && sharp)}>
              <Link
                href={item.href}
                {...(pressed && { "aria-current": "page" })}
                className={cx(
                  "flex items-center rounded-b-[5px] px-4 text-base no-underline transition-[height] duration-150 xl:px-6",
                  pressed
                    ? "h-[52px] border border-t-0 border-rule bg-pressed font-bold text-pressed-text"
                    : "h-[49px] border-x border-b-[4px] border-lid-line bg-lid-raised text-lid-text hover:border-b-[2px] hover:bg-[#3a332b]",
                )}
              >
                {item.label}
              </Link>
            </li>
          );
        })}
      </ul>
    </nav>
  );
}

function phoneKey(pressed: boolean): string {
  return cx(
    "flex w-full items-center justify-center rounded-b-[4px] px-0.5 text-center text-xs leading-tight no-underline",
    pressed
      ? "h-[58px] bg-pressed font-bold text-pressed-text"
      : "h-[54px] border-b-[4px] border-lid-line bg-lid-raised text-lid-text",
  );
}

function PhoneKeys({ items, label, current }: KeysNavProps & { current: KeyItem | undefined }) {
  const shown = items.length > 5 ? items.slice(0, 4) : items;
  const rest = items.slice(shown.length);
  const count = shown.length + (rest.length > 0 ? 1 : 0);
  const restPressed = current !== undefined && rest.includes(current);
  return (
    <nav
      aria-label={label}
      className="on-lid fixed inset-x-0 bottom-0 z-40 border-t-[3px] border-lining bg-lid pb-[env(safe-area-inset-bottom)] lg:hidden print:hidden"
    >
      <ul className="flex gap-[2px] px-1 pb-1">
        {shown.map((item, index) => (
          <li
            key={item.href}
            className={cx("relative min-w-0 flex-1", hasSharp(index, count) && sharp)}
          >
            <Link
              href={item.href as Route}
              {...(item === current && { "aria-current": "page" })}
              className={phoneKey(item === current)}
            >
              {item.label}
            </Link>
          </li>
        ))}
        {rest.length > 0 && (
          <li className="relative min-w-0 flex-1">
            <LazyMenu
              label={restPressed ? `More, now ${current.label}` : "More"}
              side="top"
              triggerClass={phoneKey(restPressed)}
              entries={rest.map((item) => ({
                kind: "link",
                label: item.label,
                href: item.href,
                current: item === current,
              }))}
            >
              {restPressed ? current.label : "More"}
            </LazyMenu>
          </li>
        )}
      </ul>
    </nav>
  );
}

/** Navigation as a row of harpsichord keys, the one in use pressed; a bar of five on phones. */
export function KeysNav({ items, label }: KeysNavProps) {
  const current = keyInUse(items, usePathname());
  return (
    <>
      <WideKeys items={items} label={label} current={current} />
      <PhoneKeys items={items} label={label} current={current} />
    </>
  );
}
