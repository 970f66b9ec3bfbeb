import type { ReactNode } from "react";

/** The monitor's screen: one column, made for a thumb. */
export function DoorFrame({ note, children }: { note: ReactNode; children: ReactNode }) {
  return (
    <>
      <header className="on-lid border-b-[3px] border-lining bg-lid px-4 text-lid-text">
        <div className="mx-auto flex min-h-14 max-w-xl items-center justify-between gap-4">
          <p className="font-serif text-[1.75rem] leading-none italic">At the door</p>
          <p className="text-sm text-lid-quiet">{note}</p>
        </div>
      </header>
      <main id="content" className="mx-auto max-w-xl px-4 pt-5 pb-16">
        {children}
      </main>
    </>
  );
}
