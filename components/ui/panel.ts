/** What lies between a dialog and the page. */
export const overlayClass = "fixed inset-0 z-40 animate-appear bg-black/55 print:hidden";

/** A dialog's panel: a sheet in the middle, the full width on phones, scrolling when tall. */
export const panelClass =
  "fixed inset-x-3 top-1/2 z-50 mx-auto flex max-h-[calc(100dvh-1.5rem)] max-w-lg -translate-y-1/2 animate-appear flex-col gap-4 overflow-y-auto rounded-lg border border-ink bg-sheet p-5 text-ink outline-none md:p-6 print:hidden";
