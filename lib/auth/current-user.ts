import "server-only";
import { auth } from "./auth";

/** The id of the signed-in login, or null. The one place that asks the session; tests stand in for it here. */
export async function currentUserId(): Promise<string | null> {
  const session = await auth();
  return session?.user?.id ?? null;
}
