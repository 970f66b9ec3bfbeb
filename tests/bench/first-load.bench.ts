import { chromium } from "playwright-core";
import { serveBareApp } from "./lib/bare-app";
import { demoEmail, productionId, sessionCookie } from "./lib/sign-in";
import type { BenchContext } from "./lib/sign-in";

/** First-load JavaScript of a page on the wire (compressed bytes of every script the browser fetches), beside a bare page. */
export default async function firstLoad(ctx: BenchContext): Promise<object[]> {
  const bare = await serveBareApp(ctx);
  const browser = await chromium.launch({
    executablePath: ctx.chromium,
    args: ["--no-sandbox", "--disable-gpu", "--disable-quic", "--disable-background-networking"],
  });
  const measure = async (url: string, cookie?: string): Promise<number> => {
    const context = await browser.newContext();
    if (cookie) {
      const [name = "", value = ""] = cookie.split("=");
      await context.addCookies([{ name, value, url: ctx.baseUrl }]);
    }
    const page = await context.newPage();
    const session = await context.newCDPSession(page);
    await session.send("Network.enable");
    const scripts = new Set<string>();
    let bytes = 0;
    session.on("Network.responseReceived", (event) => {
      if (event.type === "Script") scripts.add(event.requestId);
    });
    session.on("Network.loadingFinished", (event) => {
      if (scripts.has(event.requestId)) bytes += event.encodedDataLength;
    });
    await page.goto(url, { waitUntil: "networkidle" });
    await context.close();
    return Math.round(bytes / 1000);
  };
  try {
    const actor = await sessionCookie(ctx, demoEmail(ctx, /^Actor/));
    const md = await sessionCookie(ctx, demoEmail(ctx, /^Music director/));
    const candlemas = await productionId(ctx, "A Fair at Candlemas");
    const tidewatcher = await productionId(ctx, "The Tidewatcher");
    const marrow = await productionId(ctx, "Marrow Street");
    const bareKb = await measure(bare.url);
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
      const kb = await measure(ctx.baseUrl + path, cookie);
      lines.push({
        page,
        kb,
        bareKb,
        overBareKb: kb - bareKb,
        goal: `≤ bare + ${String(goal)} kB`,
      });
    }
    return lines;
  } finally {
    await browser.close();
    bare.stop();
  }
}
