"use client";

import { Suspense, lazy, useState, type ReactNode } from "react";
import type { MenuEntry } from "./menu-entry";

const load = () => import("./frame-menu");
const FrameMenu = lazy(load);

export type LazyMenuProps = {
  /** What the button opens, for those who do not see its sign. */
  label: string;
  /** What the button shows. */
  children: ReactNode;
  entries: readonly MenuEntry[];
  triggerClass: string;
  side?: "top" | "bottom";
};

/**
 * A button whose menu is fetched when a hand comes near it: the frame stands on every page, and a
 * phone at the stage door should not wait for a menu nobody opened.
 */
export function LazyMenu({ label, children, entries, triggerClass, side }: LazyMenuProps) {
  const [wanted, setWanted] = useState(false);
  const button = (
    <button
      type="button"
      aria-haspopup="menu"
      aria-expanded={false}
      aria-label={label}
      className={triggerClass}
      onPointerEnter={() => void load()}
      onFocus={() => void load()}
      onClick={() => {
        setWanted(true);
      }}
      onKeyDown={(event) => {
        if (event.key === "ArrowDown" || event.key === "ArrowUp") {
          event.preventDefault();
          setWanted(true);
        }
      }}
    >
      {children}
    </button>
  );
  if (!wanted) return button;
  return (
    <Suspense fallback={button}>
      <FrameMenu
        label={label}
        entries={entries}
        triggerClass={triggerClass}
        {...(side && { side })}
      >
        {children}
      </FrameMenu>
    </Suspense>
  );
}
