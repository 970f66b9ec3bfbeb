import "server-only";
import { cookies } from "next/headers";
import { env } from "@/lib/env";

/** How long a session lasts from its beginning, in days. */
export const SESSION_DAYS = 30;

const behindHttps = (): boolean => env().AUTH_URL.startsWith("https:");

const attributes = () =>
  ({ httpOnly: true, sameSite: "lax", path: "/", secure: behindHttps() }) as const;

/** The name Auth.js gives its session cookie: with `__Secure-` behind HTTPS. */
export function sessionCookieName(): string {
  return behindHttps() ? "__Secure-authjs.session-token" : "authjs.session-token";
}

/** The secret of the session that asks, or null when there is none. */
export async function currentSessionToken(): Promise<string | null> {
  const token = (await cookies()).get(sessionCookieName())?.value;
  return token === undefined || token === "" ? null : token;
}

/** Gives the browser its session, as Auth.js would: no script reads it, and another site's form does not carry it. */
export async function setSessionCookie(token: string, expires: Date): Promise<void> {
  (await cookies()).set(sessionCookieName(), token, { ...attributes(), expires });
}

/** Takes the cookie back. With its attributes: browsers ignore a `__Secure-` cookie that is cleared without `Secure`. */
export async function clearSessionCookie(): Promise<void> {
  (await cookies()).set(sessionCookieName(), "", { ...attributes(), maxAge: 0 });
}
