import type { ReactNode } from "react";

export type SideColumnProps = {
  children: ReactNode;
  /** What stands beside the main part; below it where the page is narrow. */
  side: ReactNode;
  /** Names the column for screen readers. */
  sideLabel: string;
};

/** A wide main part with a column of about 300 px beside it. */
export function SideColumn({ children, side, sideLabel }: SideColumnProps) {
  return (
    <div className="grid grid-cols-1 gap-8 lg:grid-cols-[minmax(0,1fr)_18.75rem] xl:gap-12">
      <div className="min-w-0">{children}</div>
      <aside aria-label={sideLabel} className="flex min-w-0 flex-col gap-8">
        {side}
      </aside>
    </div>
  );
}
