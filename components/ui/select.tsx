import type { ComponentProps } from "react";
import { cx } from "./cx";
import { ChevronDownIcon } from "./icons";
import { controlClass } from "./input";

/** The browser's own select, which phones and screen readers handle best, in our clothes. */
export function Select({ className, children, ...rest }: ComponentProps<"select">) {
  return (
    <span className={cx("relative block min-w-0", className)}>
      <select className={cx(controlClass, "appearance-none pr-9")} {...rest}>
        {children}
      </select>
      <span className="pointer-events-none absolute inset-y-0 right-3 flex items-center text-ink-2">
        <ChevronDownIcon />
      </span>
    </span>
  );
}
