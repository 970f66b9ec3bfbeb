import type { ReactNode } from "react";
import { AppFrame } from "@/components/layout/app-frame";

/** One task for someone who is not signed in yet: the frame without keys, and one narrow column. */
export function PublicFrame({ children }: { children: ReactNode }) {
  return (
    <AppFrame>
      <div className="mx-auto flex w-full max-w-lg flex-col gap-6">{children}</div>
    </AppFrame>
  );
}
