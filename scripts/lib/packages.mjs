import fs from "node:fs";
import path from "node:path";
import { fingerprint } from "./build.mjs";
import { Failure } from "./failure.mjs";
import { step } from "./log.mjs";
import { readJson, readText, root } from "./paths.mjs";
import { run } from "./process.mjs";

/** Stops with a clear message when Node.js is too old. */
export function checkNode() {
  const [major = 0, minor = 0] = process.versions.node.split(".").map(Number);
  const fits = (major === 20 && minor >= 19) || (major === 22 && minor >= 12) || major > 22;
  if (!fits) {
    throw new Failure(
      `Node.js ${process.versions.node} is not supported.`,
      "Install Node.js 20.19 or later in 20, or 22.12 or later, then start again.",
    );
  }
}

/** Kept inside node_modules, so that it goes when they go: the lock file that was installed from. */
const marker = path.join(root, "node_modules/.installed-from");

/** Whether what is installed is what the lock file asks for. npm writes its own list last, so a half-done install has none. */
function installed() {
  if (readText(marker) === fingerprint(["package-lock.json"])) return true;
  const wanted = readJson(path.join(root, "package-lock.json"))?.packages;
  const present = readJson(path.join(root, "node_modules/.package-lock.json"))?.packages;
  if (!wanted || !present) return false;
  return Object.entries(wanted).every(([name, entry]) => {
    if (name === "") return true;
    const found = present[name];
    // Optional packages for other systems, and left-overs of an earlier tree, are rightly absent.
    if (!found) return entry.optional === true || entry.extraneous === true;
    return found.version === entry.version && found.integrity === entry.integrity;
  });
}

/** Installs the npm packages if they are missing or the lock file has changed. */
export async function ensureNodeModules() {
  if (installed()) return;
  const first = !fs.existsSync(path.join(root, "node_modules"));
  await step(
    `Installing the npm packages${first ? "" : " (the lock file has changed)"}, about a minute`,
    async () => {
      const npm = process.env.npm_execpath;
      // Development packages are needed to build, whatever NODE_ENV says.
      const args = ["ci", "--include=dev", "--no-audit", "--no-fund", "--loglevel=error"];
      const { code, output } = npm
        ? await run(process.execPath, [npm, ...args])
        : await run("npm", args);
      if (code !== 0) {
        throw new Failure(
          `npm ci failed:\n${output.trimEnd().split("\n").slice(-20).join("\n")}`,
          "Check the network and the registry that npm is set to use, then start again.",
        );
      }
      fs.writeFileSync(marker, fingerprint(["package-lock.json"]));
    },
  );
}
