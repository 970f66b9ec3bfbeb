"use client";

import * as DropdownMenu from "radix-ui/dropdown-menu";
import type { ComponentProps } from "react";
import { cx } from "./cx";
import { CheckIcon } from "./icons";

const itemClass =
  "relative flex min-h-11 cursor-pointer items-center gap-2 rounded-sm px-3 py-1.5 text-sm text-ink no-underline outline-none select-none data-disabled:cursor-not-allowed data-disabled:opacity-55 data-highlighted:bg-ink data-highlighted:text-paper data-highlighted:[&_*]:text-paper md:min-h-9";

export function Menu(props: ComponentProps<typeof DropdownMenu.Root>) {
  return <DropdownMenu.Root {...props} />;
}

export function MenuTrigger(props: ComponentProps<typeof DropdownMenu.Trigger>) {
  return <DropdownMenu.Trigger {...props} />;
}

export function MenuContent({
  className,
  sideOffset = 6,
  portal = true,
  ...rest
}: ComponentProps<typeof DropdownMenu.Content> & {
  /** Off where the menu should stay within its landmark, as in the header. */
  portal?: boolean;
}) {
  const content = (
    <DropdownMenu.Content
      sideOffset={sideOffset}
      collisionPadding={8}
      className={cx(
        "z-50 max-h-(--radix-dropdown-menu-content-available-height) min-w-52 animate-appear overflow-y-auto rounded-md border border-ink bg-sheet p-1",
        className,
      )}
      {...rest}
    />
  );
  return portal ? <DropdownMenu.Portal>{content}</DropdownMenu.Portal> : content;
}

export function MenuItem({ className, ...rest }: ComponentProps<typeof DropdownMenu.Item>) {
  return <DropdownMenu.Item className={cx(itemClass, className)} {...rest} />;
}

export function MenuCheckItem({
  className,
  children,
  ...rest
}: ComponentProps<typeof DropdownMenu.CheckboxItem>) {
  return (
    <DropdownMenu.CheckboxItem className={cx(itemClass, className)} {...rest}>
      {children}
      <DropdownMenu.ItemIndicator className="ml-auto pl-4">
        <CheckIcon />
      </DropdownMenu.ItemIndicator>
    </DropdownMenu.CheckboxItem>
  );
}

export function MenuHeading({ className, ...rest }: ComponentProps<typeof DropdownMenu.Label>) {
  return (
    <DropdownMenu.Label
      className={cx("px-3 pt-2 pb-1 text-xs font-bold text-ink-2", className)}
      {...rest}
    />
  );
}

export function MenuLine() {
  return <DropdownMenu.Separator className="my-1 h-px bg-rule" />;
}
