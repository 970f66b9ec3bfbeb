import autocannon from "autocannon";
import { serveBareApp } from "./lib/bare-app";
import { demoEmail, productionId, sessionCookie } from "./lib/sign-in";
import type { BenchContext } from "./lib/sign-in";

type Times = { p50: number; p95: number; perSecond: number };

const nearestRank = (sorted: number[], p: number): number =>
  sorted[Math.max(0, Math.ceil(p * sorted.length) - 1)] ?? NaN;

async function load(url: string, connections: number, cookie?: string): Promise<Times> {
  const run = (duration: number, times: number[]) =>
    new Promise<autocannon.Result>((resolve, reject) => {
      const instance = autocannon(
        { url, connections, duration, headers: cookie ? { cookie } : {} },
        (error: Error | null, result) => {
          if (error) reject(error);
          else resolve(result);
        },
      );
      instance.on("response", (_client, _status, _bytes, milliseconds) => times.push(milliseconds));
    });
  await run(2, []); // to be warm
  const times: number[] = [];
  const result = await run(5, times);
  if (result.non2xx > 0 || result.errors > 0)
    throw new Error(
      `${url}: ${String(result.non2xx)} answers that were not 200, ${String(result.errors)} errors`,
    );
  times.sort((a, b) => a - b);
  const round = (ms: number) => Number(ms.toFixed(1));
  return {
    p50: round(nearestRank(times, 0.5)),
    p95: round(nearestRank(times, 0.95)),
    perSecond: Math.round(result.requests.average),
  };
}

/** A server-rendered page at 1 and 20 clients beside a bare page of the same framework that reads one row. Milliseconds. */
export default async function pages(ctx: BenchContext): Promise<object[]> {
  const bare = await serveBareApp(ctx);
  try {
    const actor = await sessionCookie(ctx, demoEmail(ctx, /^Actor/));
    const md = await sessionCookie(ctx, demoEmail(ctx, /^Music director/));
    const candlemas = await productionId(ctx, "A Fair at Candlemas");
    const subjects = [
      { page: "sign-in", path: "/sign-in", cookie: undefined },
      { page: "me", path: "/me", cookie: actor },
      { page: "season", path: "/season", cookie: md },
      { page: "casting", path: `/productions/${candlemas}/casting`, cookie: md },
    ];
    const lines: object[] = [];
    for (const clients of [1, 20]) {
      const yardstick = await load(bare.url, clients);
      for (const subject of subjects) {
        ctx.log(`${subject.page}, ${String(clients)} clients`);
        const ours = await load(ctx.baseUrl + subject.path, clients, subject.cookie);
        lines.push({
          page: subject.page,
          clients,
          ours,
          bare: yardstick,
          ratioP50: Number((ours.p50 / yardstick.p50).toFixed(2)),
          ratioP95: Number((ours.p95 / yardstick.p95).toFixed(2)),
          goal: "ratio ≤ 2",
        });
      }
    }
    return lines;
  } finally {
    bare.stop();
  }
}
