import * as Slot from "radix-ui/slot";
import type { ComponentProps } from "react";
import { cx } from "./cx";

export type ButtonKind = "primary" | "secondary" | "quiet" | "danger";
export type ButtonSize = "small" | "medium" | "large";

const kinds: Record<ButtonKind, string> = {
  primary: "border border-ink bg-ink text-paper hover:border-ink-2 hover:bg-ink-2",
  secondary: "border border-ink bg-sheet text-ink hover:bg-bone",
  quiet:
    "border border-transparent text-smalt underline-offset-4 hover:bg-smalt-wash hover:underline",
  danger: "border border-vermilion bg-sheet text-vermilion hover:bg-vermilion-wash",
};

// At least 44 px high where fingers press; lower where there is a mouse and the page is wide.
const sizes: Record<ButtonSize, string> = {
  small: "min-h-11 px-3 text-sm md:min-h-8",
  medium: "min-h-11 px-4 text-sm md:min-h-10",
  large: "min-h-13 px-6 text-base",
};

/** The classes of a button, for what must look like one and cannot be a Button. */
export function buttonClass(options: { kind?: ButtonKind; size?: ButtonSize } = {}): string {
  return cx(
    "inline-flex max-w-full items-center justify-center gap-2 rounded-md py-1.5 text-center font-bold no-underline transition-colors duration-150 select-none",
    "disabled:cursor-not-allowed disabled:opacity-55 aria-disabled:cursor-not-allowed aria-disabled:opacity-55",
    kinds[options.kind ?? "secondary"],
    sizes[options.size ?? "medium"],
  );
}

export type ButtonProps = ComponentProps<"button"> & {
  kind?: ButtonKind;
  size?: ButtonSize;
  /** Gives the looks to the only child instead, for instance a link. */
  asChild?: boolean;
};

/** A button; `secondary` and `medium` unless told, and never a submit button unless told. */
export function Button({ kind, size, asChild = false, className, type, ...rest }: ButtonProps) {
  const classes = cx(buttonClass({ ...(kind && { kind }), ...(size && { size }) }), className);
  if (asChild) return <Slot.Root className={classes} {...rest} />;
  return <button type={type ?? "button"} className={classes} {...rest} />;
}
