import type { ReactNode } from "react";

/** Words for those who listen to the page; inside a line, so as not to break it. */
export function VisuallyHidden({ children }: { children: ReactNode }) {
  return <span className="sr-only">{children}</span>;
}
