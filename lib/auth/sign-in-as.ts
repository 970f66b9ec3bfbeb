import "server-only";
import { deleteSession } from "@/lib/data/sessions";
import { newSecret } from "./hash-token";
import { currentSessionToken, SESSION_DAYS, setSessionCookie } from "./session-cookie";
import { startSession } from "./start-session";

/**
 * Begins a session of this login in the browser that asks: a new row and its cookie. The session it had before is ended,
 * so that none is left behind that nobody can reach. The caller has checked who it is.
 */
export async function signInAs(userId: string): Promise<void> {
  const before = await currentSessionToken();
  const session = {
    sessionToken: newSecret(),
    userId,
    expires: new Date(Date.now() + SESSION_DAYS * 86_400_000),
  };
  await startSession(session);
  await setSessionCookie(session.sessionToken, session.expires);
  if (before) await deleteSession(before);
}
