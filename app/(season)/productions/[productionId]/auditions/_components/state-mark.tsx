import type { ReactNode } from "react";
import { cx } from "@/components/ui/cx";
import type { SignUpState } from "@/lib/auditions/day-view";

const shapes: Record<SignUpState, ReactNode> = {
  listed: <circle cx="6" cy="6" r="4.25" fill="none" strokeWidth="1.5" />,
  invited: (
    <>
      <circle cx="6" cy="6" r="4.25" fill="none" strokeWidth="1.5" />
      <path d="M6 1.75a4.25 4.25 0 0 1 0 8.5z" fill="currentColor" stroke="none" />
    </>
  ),
  confirmed: <circle cx="6" cy="6" r="5" fill="currentColor" stroke="none" />,
  declined: <path d="M2 2l8 8m0-8l-8 8" fill="none" strokeWidth="2" />,
  withdrawn: <path d="M1.5 6h9" fill="none" strokeWidth="2" />,
};

const tones: Record<SignUpState, string> = {
  listed: "text-ink-2",
  invited: "text-smalt",
  confirmed: "text-verdigris",
  declined: "text-vermilion",
  withdrawn: "text-ink-2",
};

/** How far a sign-up has come: a shape and the word for it. */
export function StateMark({ state, className }: { state: SignUpState; className?: string }) {
  return (
    <span
      className={cx("inline-flex items-center gap-1.5 whitespace-nowrap", tones[state], className)}
    >
      <svg
        viewBox="0 0 12 12"
        width="11"
        height="11"
        stroke="currentColor"
        aria-hidden="true"
        className="shrink-0"
      >
        {shapes[state]}
      </svg>
      {state}
    </span>
  );
}
