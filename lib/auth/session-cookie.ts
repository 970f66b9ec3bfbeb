import "server-only";
import { env } from "@/lib/env";

/** The name Auth.js gives its session cookie: with `__Secure-` behind HTTPS. */
export function sessionCookieName(): string {
  return env().AUTH_URL.startsWith("https:") ? "__Secure-authjs.session-token" : "authjs.session-token";
}
