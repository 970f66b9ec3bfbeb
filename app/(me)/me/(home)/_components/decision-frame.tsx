import type { ReactNode } from "react";

/** One decision: what it is as the page's heading, and a card with when, where and the answers. */
export function DecisionFrame({
  title,
  sub,
  children,
}: {
  title: string;
  sub: ReactNode;
  children: ReactNode;
}) {
  return (
    <section aria-labelledby="decision">
      <h1 id="decision" className="text-3xl md:text-4xl">
        {title}
      </h1>
      <p className="mt-1">{sub}</p>
      <div className="mt-5 border border-ink bg-sheet p-4">{children}</div>
    </section>
  );
}

/** The day large, the time beside it, and under both where to be. */
export function WhenAndWhere({
  day,
  time,
  children,
}: {
  day: string;
  time: string;
  children: ReactNode;
}) {
  return (
    <>
      <div className="flex flex-wrap items-baseline justify-between gap-x-4">
        <h2 className="text-2xl">{day}</h2>
        <p className="text-xl font-bold">{time}</p>
      </div>
      <p className="text-sm text-ink-2">{children}</p>
    </>
  );
}

/** What to have ready, under a rule. */
export function Prepare({ label, children }: { label: string; children: ReactNode }) {
  return (
    <div className="mt-4 border-t border-rule pt-3">
      <h3 className="small-caps">{label}</h3>
      <p className="mt-1 whitespace-pre-line">{children}</p>
    </div>
  );
}
