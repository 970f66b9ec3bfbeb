import type { Page, Route } from "playwright-core";

/**
 * Keeps a page from hearing of changes: what it asks for again by itself gets no answer until the returned function is
 * called. What the person sends goes through.
 */
export async function holdBack(page: Page, readers: RegExp): Promise<() => Promise<void>> {
  const held: Route[] = [];
  await page.route(readers, (route) => {
    held.push(route);
  });
  return async () => {
    await page.unroute(readers);
    // A page may have given up asking meanwhile.
    await Promise.all(held.map((route) => route.continue().catch(() => undefined)));
  };
}
