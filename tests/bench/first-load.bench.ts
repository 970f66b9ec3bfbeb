import { chromium } from "playwright-core";
import { serveBareApp } from "./lib/bare-app";
import { demoEmail, productionId, sessionCookie } from "./lib/sign-in";
import type { BenchContext } from "./lib/sign-in";

/**
 * First-load JavaScript of a page on the wire, beside a bare page: the compressed bytes of the scripts that the page's own
 * HTML names. `withAheadKb` adds what the browser fetches ahead for pages that are linked to, once the page is idle.
 */
export default async function firstLoad(ctx: BenchContext): Promise<object[]> {
  const bare = await serveBareApp(ctx);
  const browser = await chromium.launch({
    executablePath: ctx.chromium,
    args: ["--no-sandbox", "--disable-gpu", "--disable-quic", "--disable-background-networking"],
  });
  const measure = async (
    url: string,
    cookie?: string,
  ): Promise<{ kb: number; withAheadKb: number }> => {
    const context = await browser.newContext();
    if (cookie) {
      const [name = "", value = ""] = cookie.split("=");
      await context.addCookies([{ name, value, url: ctx.baseUrl }]);
    }
    const page = await context.newPage();
    const session = await context.newCDPSession(page);
    await session.send("Network.enable");
    const urls = new Map<string, string>();
    const bytes = new Map<string, number>();
    session.on("Network.responseReceived", (event) => {
      if (event.type === "Script") urls.set(event.requestId, event.response.url);
    });
    session.on("Network.loadingFinished", (event) => {
      const script = urls.get(event.requestId);
      if (script !== undefined) bytes.set(script, event.encodedDataLength);
    });
    const response = await page.goto(url, { waitUntil: "networkidle" });
    const html = (await response?.text()) ?? "";
    const own = new Set(
      [...html.matchAll(/<script[^>]* src="([^"]+)"/g)].map(
        ([, src = ""]) => new URL(src, url).href,
      ),
    );
    const sum = (wanted: (script: string) => boolean): number =>
      Math.round(
        [...bytes]
          .filter(([script]) => wanted(script))
          .reduce((total, [, size]) => total + size, 0) / 1000,
      );
    await context.close();
    return { kb: sum((script) => own.has(script)), withAheadKb: sum(() => true) };
  };
  try {
    const actor = await sessionCookie(ctx, demoEmail(ctx, /^Actor/));
    const md = await sessionCookie(ctx, demoEmail(ctx, /^Music director/));
    const candlemas = await productionId(ctx, "A Fair at Candlemas");
    const tidewatcher = await productionId(ctx, "The Tidewatcher");
    const marrow = await productionId(ctx, "Marrow Street");
    const { kb: bareKb } = await measure(bare.url);
    const lines: object[] = [];
    const subjects: [page: string, path: string, cookie: string | undefined, goal: number][] = [
      ["front", "/", undefined, 30],
      ["me", "/me", actor, 30],
      ["me/range", "/me/range", actor, 30],
      ["me/conflicts", "/me/conflicts", actor, 30],
      ["season", "/season", md, 90],
      ["score", `/productions/${candlemas}/score`, md, 90],
      ["auditions", `/productions/${tidewatcher}/auditions`, md, 90],
      ["callbacks", `/productions/${candlemas}/callbacks`, md, 90],
      ["casting", `/productions/${candlemas}/casting`, md, 90],
      ["rehearsals", `/productions/${marrow}/rehearsals`, md, 90],
    ];
    for (const [page, path, cookie, goal] of subjects) {
      const { kb, withAheadKb } = await measure(ctx.baseUrl + path, cookie);
      lines.push({
        page,
        kb,
        bareKb,
        overBareKb: kb - bareKb,
        withAheadKb,
        goal: `≤ bare + ${String(goal)} kB`,
      });
    }
    return lines;
  } finally {
    await browser.close();
    bare.stop();
  }
}
