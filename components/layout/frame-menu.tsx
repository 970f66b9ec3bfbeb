"use client";

import Link from "next/link";
import { startTransition, useState, type ReactNode } from "react";
import {
  Menu,
  MenuCheckItem,
  MenuContent,
  MenuHeading,
  MenuItem,
  MenuLine,
  MenuTrigger,
} from "@/components/ui/menu";
import type { MenuEntry } from "./menu-entry";
import { readMode, setMode } from "./mode";

function ModeItem() {
  const [mode, setShown] = useState(() => readMode(document.documentElement.dataset["mode"]));
  return (
    <MenuCheckItem
      checked={mode === "lamp"}
      onCheckedChange={(checked) => {
        const next = checked ? "lamp" : "day";
        setMode(next);
        setShown(next);
      }}
      onSelect={(event) => {
        event.preventDefault();
      }}
    >
      Lamp mode
    </MenuCheckItem>
  );
}

function Entry({ entry }: { entry: MenuEntry }) {
  switch (entry.kind) {
    case "line":
      return <MenuLine />;
    case "heading":
      return <MenuHeading>{entry.label}</MenuHeading>;
    case "mode":
      return <ModeItem />;
    case "action":
      return (
        <MenuItem
          onSelect={() => {
            startTransition(async () => {
              await entry.action();
            });
          }}
        >
          {entry.label}
        </MenuItem>
      );
    case "link":
      return (
        <MenuItem asChild>
          <Link href={entry.href} {...(entry.current && { "aria-current": "page" })}>
            <span className={entry.current ? "font-bold" : ""}>{entry.label}</span>
            {entry.note && <span className="ml-auto pl-4 text-ink-2">{entry.note}</span>}
          </Link>
        </MenuItem>
      );
  }
}

export type FrameMenuProps = {
  label: string;
  children: ReactNode;
  entries: readonly MenuEntry[];
  triggerClass: string;
  side?: "top" | "bottom";
};

/** The menu behind LazyMenu: open from its first moment, because it was asked for by a press. */
export default function FrameMenu({
  label,
  children,
  entries,
  triggerClass,
  side = "bottom",
}: FrameMenuProps) {
  return (
    <Menu defaultOpen modal={false}>
      <MenuTrigger aria-label={label} className={triggerClass}>
        {children}
      </MenuTrigger>
      <MenuContent side={side} align="end" portal={false}>
        {entries.map((entry, index) => (
          <Entry key={index} entry={entry} />
        ))}
      </MenuContent>
    </Menu>
  );
}
