/**
 * Where a request comes from, as rate limits count it: the last address of `x-forwarded-for`, which our own proxy or server
 * wrote; the ones before it are only what the sender claims.
 */
export function sourceOf(headers: Pick<Headers, "get">): string {
  return headers.get("x-forwarded-for")?.split(",").at(-1)?.trim() ?? "unknown";
}
