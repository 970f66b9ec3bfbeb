import { NextResponse } from "next/server";
import type { NextRequest } from "next/server";
import { ASKED_FOR } from "@/lib/auth/asked-for";

/**
 * The nonce CSP and the usual headers on every page. It guards nothing: permission is asked in `lib/data`.
 * Upload routes are left out of the matcher, because a proxied body is cut off at 10 MB without an error.
 */
export function proxy(request: NextRequest): NextResponse {
  const nonce = Buffer.from(crypto.randomUUID()).toString("base64");
  const development = process.env.NODE_ENV === "development";
  const csp = [
    "default-src 'self'",
    // The development server's refresh needs eval; the built product does not.
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${development ? " 'unsafe-eval'" : ""}`,
    // Style attributes carry the measured positions of drawings; styles cannot run code.
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' blob: data:",
    "font-src 'self'",
    `connect-src 'self'${development ? " ws:" : ""}`,
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
    "manifest-src 'self'",
    "worker-src 'self'",
  ].join("; ");
  const requestHeaders = new Headers(request.headers);
  requestHeaders.set("x-nonce", nonce);
  // Where someone who has to sign in first comes back to: a layout does not know the page below it.
  requestHeaders.set(ASKED_FOR, request.nextUrl.pathname + request.nextUrl.search);
  requestHeaders.set("content-security-policy", csp);
  const response = NextResponse.next({ request: { headers: requestHeaders } });
  response.headers.set("content-security-policy", csp);
  return response;
}

export const config = {
  matcher: ["/((?!_next/static|_next/image|api/|favicon.ico|icon.svg|workers/).*)"],
};
