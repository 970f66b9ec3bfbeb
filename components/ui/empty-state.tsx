import type { ReactNode } from "react";

export type EmptyStateProps = {
  title: ReactNode;
  /** What belongs here, in a sentence. */
  children: ReactNode;
  /** The first step, as a button or a link. */
  action?: ReactNode;
  /** 1 where it is all there is on the page, 3 where the part already stands under a second heading; else 2. */
  level?: 1 | 2 | 3;
};

/** An empty place says what belongs there and offers the first step. */
export function EmptyState({ title, children, action, level = 2 }: EmptyStateProps) {
  const Heading = `h${level}` as const;
  return (
    <div className="flex flex-col items-start gap-3 border-y border-rule px-1 py-8">
      <Heading className="text-2xl">{title}</Heading>
      <div className="max-w-prose text-ink-2">{children}</div>
      {action && <div className="mt-1 flex flex-wrap gap-3">{action}</div>}
    </div>
  );
}
