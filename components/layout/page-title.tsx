import type { ReactNode } from "react";

export type PageTitleProps = {
  title: ReactNode;
  /** One line in plain words under the title. */
  sub?: ReactNode;
  /** Chips: what needs looking at, in words. */
  chips?: ReactNode;
  /** Buttons, the main one last. */
  actions?: ReactNode;
};

/** The page's heading, with what needs a look and what can be done at the right. */
export function PageTitle({ title, sub, chips, actions }: PageTitleProps) {
  return (
    <div className="mb-6 flex flex-wrap items-end justify-between gap-x-8 gap-y-3">
      <div className="max-w-3xl min-w-0 flex-[1_1_20rem]">
        <h1 className="text-3xl md:text-4xl">{title}</h1>
        {sub && <p className="mt-1 text-ink-2">{sub}</p>}
      </div>
      {(chips ?? actions) && (
        <div className="flex flex-wrap items-center gap-3 print:hidden">
          {chips}
          {actions}
        </div>
      )}
    </div>
  );
}

/** A heading of a part of the page, over a rule when a list follows. */
export function SectionTitle({
  children,
  ruled = false,
  id,
}: {
  children: ReactNode;
  ruled?: boolean;
  id?: string;
}) {
  return (
    <h2
      {...(id !== undefined && { id })}
      className={ruled ? "mb-0 border-b border-rule pb-2 text-2xl" : "mb-2 text-2xl"}
    >
      {children}
    </h2>
  );
}
