import type { ComponentProps } from "react";
import { cx } from "./cx";

export type IconButtonProps = Omit<ComponentProps<"button">, "aria-label"> & {
  /** What the button does, in words: the sign alone has no name. */
  label: string;
};

/** A square button that shows one sign; 44 px on phones, 32 px elsewhere. */
export function IconButton({ label, className, type, children, ...rest }: IconButtonProps) {
  return (
    <button
      type={type ?? "button"}
      aria-label={label}
      title={label}
      className={cx(
        "inline-flex size-11 items-center justify-center rounded-md text-ink hover:bg-bone disabled:opacity-55 md:size-8",
        className,
      )}
      {...rest}
    >
      {children}
    </button>
  );
}
