import type { ComponentProps, ReactNode } from "react";
import { cx } from "./cx";

export type ChipTone = "clash" | "stretch" | "fits" | "info" | "plain";

const tones: Record<ChipTone, string> = {
  clash: "bg-vermilion-wash text-vermilion",
  stretch: "bg-ochre-wash text-ochre",
  fits: "bg-verdigris-wash text-verdigris",
  info: "bg-smalt-wash text-smalt",
  plain: "bg-bone text-ink",
};

export type ChipProps = Omit<ComponentProps<"span">, "children"> & {
  tone?: ChipTone;
  /** The word that says what the colour says. */
  children: ReactNode;
};

/** A short verdict or count on a coloured ground; the words always carry the meaning. */
export function Chip({ tone = "plain", className, ...rest }: ChipProps) {
  return (
    <span
      className={cx(
        "inline-flex items-center rounded-sm px-2 py-0.5 text-xs font-bold whitespace-nowrap print:border print:border-black",
        tones[tone],
        className,
      )}
      {...rest}
    />
  );
}
