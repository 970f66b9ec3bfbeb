import autocannon from "autocannon";
import { readFileSync } from "node:fs";
import { demoEmail, sessionCookie } from "./lib/sign-in";
import type { BenchContext } from "./lib/sign-in";

/** Resident memory of the server's process in MB: idle, warm, and after 5,000 and 10,000 requests of a page that reads the database. */
export default async function memory(ctx: BenchContext): Promise<object> {
  const resident = (): number => {
    const line =
      /VmRSS:\s+(\d+)/.exec(readFileSync(`/proc/${String(ctx.appPid)}/status`, "utf8"))?.[1] ?? "0";
    return Math.round(Number(line) / 1024);
  };
  const settle = () => new Promise((resolve) => setTimeout(resolve, 3000));
  const cookie = await sessionCookie(ctx, demoEmail(ctx, /^Actor/));
  const requests = async (amount: number) => {
    const result = await autocannon({
      url: `${ctx.baseUrl}/me`,
      connections: 10,
      amount,
      headers: { cookie },
    });
    if (result.non2xx > 0) throw new Error(`${String(result.non2xx)} answers were not 200`);
    await settle();
    return resident();
  };
  const idle = resident();
  const warm = await requests(1000);
  const after5000 = await requests(5000);
  const after10000 = await requests(5000);
  return {
    idleMb: idle,
    warmMb: warm,
    after5000Mb: after5000,
    after10000Mb: after10000,
    growthMb: after10000 - after5000,
    goal: "no growth once warm",
  };
}
