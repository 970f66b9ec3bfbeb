// Bundles the threads that run beside the server into .run/workers, each into one file.
import { rename } from "node:fs/promises";
import path from "node:path";
import { fileURLToPath } from "node:url";
import { build } from "esbuild";

const root = path.resolve(import.meta.dirname, "..");
const outdir = path.join(root, ".run/workers");

const WORKERS = { musicxml: "lib/formats/musicxml/worker.ts" };

/** Builds every worker. A file is replaced in one step, so a running server never finds half of one. */
export async function buildWorkers() {
  for (const [name, source] of Object.entries(WORKERS)) {
    const fresh = path.join(outdir, `${name}.${String(process.pid)}.tmp`);
    await build({
      absWorkingDir: root,
      entryPoints: [source],
      outfile: fresh,
      bundle: true,
      platform: "node",
      format: "esm",
      target: "node20",
      alias: { "@": root },
      logLevel: "warning",
    });
    await rename(fresh, path.join(outdir, `${name}.mjs`));
  }
}

if (process.argv[1] === fileURLToPath(import.meta.url)) await buildWorkers();
