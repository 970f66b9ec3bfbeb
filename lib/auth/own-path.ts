const SOMEWHERE = "http://own.invalid";
const LONGEST = 1000;

/**
 * Where to go after signing in: `raw` when it is a path of our own, else `fallback`. Refused are other sites in any
 * spelling (`//host`, `/\host`, a scheme, control characters that browsers drop, dots that melt into `//`), our API, and
 * the sign-in pages themselves, which would go round in a circle.
 */
export function ownPath(raw: unknown, fallback: string): string {
  if (
    typeof raw !== "string" ||
    raw.length > LONGEST ||
    !raw.startsWith("/") ||
    /[\\\u0000-\u001f\u007f]/.test(raw)
  )
    return fallback;
  let url: URL;
  try {
    url = new URL(raw, SOMEWHERE);
  } catch {
    return fallback;
  }
  if (url.origin !== SOMEWHERE || url.pathname.startsWith("//")) return fallback;
  if (/^\/(api|sign-in)(\/|$)/.test(url.pathname)) return fallback;
  return url.pathname + url.search + url.hash;
}
