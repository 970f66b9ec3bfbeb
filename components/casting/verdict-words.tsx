import { cx } from "@/components/ui/cx";
import type { FitVerdict } from "@/lib/music/types";

const tones: Record<FitVerdict, string> = {
  fits: "font-bold text-verdigris",
  stretch: "font-bold text-ochre",
  out: "font-bold text-vermilion",
};

/** A verdict on a range in its words; quiet where there is none to give. */
export function VerdictWords({
  verdict,
  words,
  quiet = false,
  className,
}: {
  verdict: FitVerdict | null;
  words: string;
  /** Steps back where the singer is far out. */
  quiet?: boolean;
  className?: string;
}) {
  return (
    <span className={cx("text-xs", verdict && !quiet ? tones[verdict] : "text-ink-2", className)}>
      {words}
    </span>
  );
}
