import "server-only";
import { env } from "@/lib/env";
import { AppError } from "@/lib/errors";

/** A page of another site cannot write with our cookie: browsers tell where a request comes from. */
export function assertOwnOrigin(request: Request): void {
  if (request.method === "GET" || request.method === "HEAD") return;
  const site = request.headers.get("sec-fetch-site");
  if (site !== null && site !== "same-origin" && site !== "none")
    throw new AppError("not-allowed", "Send this from Cembalo's own pages.");
  const origin = request.headers.get("origin");
  if (origin === null) return;
  const host = request.headers.get("host");
  const own = [new URL(env().AUTH_URL).host, host];
  const from = hostOf(origin);
  if (from === null || !own.includes(from))
    throw new AppError("not-allowed", "Send this from Cembalo's own pages.");
}

// "null" is what sandboxed pages send as their origin: no host of ours.
function hostOf(origin: string): string | null {
  return URL.canParse(origin) ? new URL(origin).host : null;
}
