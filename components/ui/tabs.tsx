"use client";

import * as RadixTabs from "radix-ui/tabs";
import type { ComponentProps, ReactNode } from "react";

export type TabsProps = Omit<ComponentProps<typeof RadixTabs.Root>, "children"> & {
  /** Names the row of tabs. */
  label: string;
  tabs: readonly { value: string; label: ReactNode; content: ReactNode }[];
};

/** Views of the same thing, one at a time. Arrow keys move between the tabs. */
export function Tabs({ label, tabs, ...rest }: TabsProps) {
  const first = tabs[0]?.value;
  return (
    <RadixTabs.Root
      {...(rest.value === undefined && first !== undefined && { defaultValue: first })}
      {...rest}
    >
      <RadixTabs.List
        aria-label={label}
        className="mb-4 flex gap-1 overflow-x-auto border-b border-rule"
      >
        {tabs.map((tab) => (
          <RadixTabs.Trigger
            key={tab.value}
            value={tab.value}
            className="min-h-11 border-b-[3px] border-transparent px-3 text-base whitespace-nowrap text-ink-2 -outline-offset-2 hover:text-ink data-[state=active]:border-ink data-[state=active]:font-bold data-[state=active]:text-ink"
          >
            {tab.label}
          </RadixTabs.Trigger>
        ))}
      </RadixTabs.List>
      {tabs.map((tab) => (
        <RadixTabs.Content key={tab.value} value={tab.value}>
          {tab.content}
        </RadixTabs.Content>
      ))}
    </RadixTabs.Root>
  );
}
