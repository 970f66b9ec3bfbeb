import type { ReactNode } from "react";
import { cx } from "@/components/ui/cx";

/** A number or letter in a small square, as a printed score marks its places. */
export function RehearsalMark({
  children,
  className,
}: {
  children: ReactNode;
  className?: string;
}) {
  return (
    <span
      className={cx(
        "inline-flex h-6 min-w-6 items-center justify-center border border-ink bg-sheet px-1 text-xs leading-none font-bold text-ink",
        className,
      )}
    >
      {children}
    </span>
  );
}
