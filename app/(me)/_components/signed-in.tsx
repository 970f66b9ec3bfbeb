import type { ReactNode } from "react";
import { pageActor } from "@/lib/auth/get-actor";

/** A layout that sends those who are not signed in away before anything is sent, outside the page's loading state. */
export function signedIn(from: string) {
  return async function SignedIn({ children }: { children: ReactNode }): Promise<ReactNode> {
    await pageActor(from);
    return children;
  };
}
