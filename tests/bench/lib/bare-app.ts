import { spawn, spawnSync } from "node:child_process";
import { existsSync, mkdirSync, rmSync, symlinkSync, writeFileSync } from "node:fs";
import { createServer } from "node:net";
import path from "node:path";
import type { BenchContext } from "./sign-in";

const PAGE = `import mysql from "mysql2/promise";
const pool = mysql.createPool({ uri: process.env.DATABASE_URL, connectionLimit: 20 });
export const dynamic = "force-dynamic";
export default async function Page() {
  const [rows] = await pool.query("select name from companies limit 1");
  return <main><h1>{rows[0].name}</h1></main>;
}
`;
const LAYOUT = `export default function Layout({ children }) {
  return <html lang="en"><body>{children}</body></html>;
}
`;

async function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once("error", reject);
    server.listen(0, "127.0.0.1", () => {
      const address = server.address();
      server.close(() => {
        resolve(typeof address === "object" && address ? address.port : 0);
      });
    });
  });
}

/**
 * The yardstick: a page of the same framework and version that reads one row through mysql2 and does nothing else, built and
 * served in the same run. Returns its address and how to stop it.
 */
export async function serveBareApp(ctx: BenchContext): Promise<{ url: string; stop: () => void }> {
  const dir = path.join(ctx.runDir, "bare-app");
  rmSync(dir, { recursive: true, force: true });
  mkdirSync(path.join(dir, "app"), { recursive: true });
  writeFileSync(
    path.join(dir, "package.json"),
    JSON.stringify({ name: "bare", private: true, type: "module" }),
  );
  writeFileSync(path.join(dir, "app/page.jsx"), PAGE);
  writeFileSync(path.join(dir, "app/layout.jsx"), LAYOUT);
  writeFileSync(
    path.join(dir, "next.config.mjs"),
    `export default { turbopack: { root: ${JSON.stringify(ctx.root)} }, serverExternalPackages: ["mysql2"], poweredByHeader: false };\n`,
  );
  symlinkSync(path.join(ctx.root, "node_modules"), path.join(dir, "node_modules"));
  const next = path.join(ctx.root, "node_modules/next/dist/bin/next");
  const env = {
    ...process.env,
    DATABASE_URL: ctx.databaseUrl,
    NEXT_TELEMETRY_DISABLED: "1",
    NODE_ENV: "production" as const,
  };
  ctx.log("building the bare page");
  const built = spawnSync(process.execPath, [next, "build"], { cwd: dir, env, encoding: "utf8" });
  if (built.status !== 0 || !existsSync(path.join(dir, ".next/BUILD_ID")))
    throw new Error(`The bare page did not build: ${built.stdout} ${built.stderr}`);
  const port = await freePort();
  const server = spawn(process.execPath, [next, "start", "-H", "127.0.0.1", "-p", String(port)], {
    cwd: dir,
    env,
    stdio: "ignore",
  });
  const url = `http://127.0.0.1:${String(port)}/`;
  for (let tries = 0; tries < 100; tries += 1) {
    const up = await fetch(url).then(
      (r) => r.ok,
      () => false,
    );
    if (up) break;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  return {
    url,
    stop: () => {
      server.kill("SIGTERM");
    },
  };
}
