import { spawn, spawnSync } from "node:child_process";
import { rmSync } from "node:fs";
import path from "node:path";
import type { BenchContext } from "./lib/sign-in";

/** Runs `npm start` in a folder until it prints an address that answers. Seconds, and how to stop it. */
async function startOnce(dir: string): Promise<number> {
  const started = performance.now();
  const child = spawn("npm", ["start"], {
    cwd: dir,
    stdio: ["ignore", "pipe", "pipe"],
    detached: true,
  });
  let output = "";
  const address = await new Promise<string>((resolve, reject) => {
    const read = (chunk: Buffer) => {
      output += chunk.toString();
      const found = /http:\/\/localhost:\d+/.exec(output)?.[0];
      if (found) resolve(found);
    };
    child.stdout.on("data", read);
    child.stderr.on("data", read);
    child.once("exit", (code) => {
      reject(new Error(`npm start ended with ${String(code)}: ${output.slice(-2000)}`));
    });
  });
  const page = await fetch(address);
  if (!page.ok) throw new Error(`the first page answered ${String(page.status)}`);
  const seconds = (performance.now() - started) / 1000;
  child.removeAllListeners("exit");
  spawnSync("npm", ["stop"], { cwd: dir });
  return Number(seconds.toFixed(1));
}

/** From `npm start` to the first page: in a fresh clone without node_modules, and once more there. The clone is of what is committed. */
export default async function start(ctx: BenchContext): Promise<object> {
  const dir = path.join(ctx.runDir, "fresh-clone");
  rmSync(dir, { recursive: true, force: true });
  const cloned = spawnSync("git", ["clone", "--quiet", ctx.root, dir], { encoding: "utf8" });
  if (cloned.status !== 0) throw new Error(cloned.stderr);
  try {
    ctx.log("npm start in a fresh clone");
    const fresh = await startOnce(dir);
    ctx.log("npm start again");
    const again = await startOnce(dir);
    return { freshSeconds: fresh, againSeconds: again, goal: "fresh ≤ 150 s, again ≤ 5 s" };
  } finally {
    rmSync(dir, { recursive: true, force: true });
  }
}
