import type { ComponentProps } from "react";
import { cx } from "./cx";

/** The looks shared by every control one types into or picks from. 16 px on phones stops zooming. */
export const controlClass =
  "w-full min-w-0 rounded-sm border border-ink-3 bg-sheet px-3 py-2 text-[1rem] text-ink md:text-base min-h-11 md:min-h-10 aria-invalid:border-2 aria-invalid:border-vermilion disabled:bg-bone disabled:text-ink-2 [&[readonly]]:bg-bone";

export function Input({ className, type, ...rest }: ComponentProps<"input">) {
  return (
    <input
      type={type ?? "text"}
      className={cx(
        controlClass,
        type === "file" &&
          "file:mr-3 file:rounded-sm file:border file:border-ink file:bg-sheet file:px-3 file:py-1 file:text-sm file:font-bold file:text-ink",
        className,
      )}
      {...rest}
    />
  );
}
