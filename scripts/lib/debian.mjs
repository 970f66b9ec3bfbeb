import fs from "node:fs";
import path from "node:path";
import { Failure } from "./failure.mjs";
import { say } from "./log.mjs";
import { run } from "./process.mjs";

const POLICY = "/usr/sbin/policy-rc.d";
const FOLDERS = ["/usr/local/sbin", "/usr/local/bin", "/usr/sbin", "/usr/bin", "/sbin", "/bin"];

/** What each need is called as a program and as a Debian package. */
const NEEDS = {
  mariadb: {
    packages: ["mariadb-server"],
    programs: ["mariadbd", "mariadb-install-db", "mariadb", "mariadb-admin"],
  },
  chromium: { packages: ["chromium"], programs: ["chromium"] },
};

/**
 * Finds a program, also in the folders that an ordinary account does not search.
 * @param {string} name
 * @returns {string | null} its path
 */
export function findProgram(name) {
  const folders = [...(process.env.PATH ?? "").split(":"), ...FOLDERS].filter(Boolean);
  for (const folder of folders) {
    const file = path.join(folder, name);
    try {
      fs.accessSync(file, fs.constants.X_OK);
      if (fs.statSync(file).isFile()) return file;
    } catch {
      // Not here.
    }
  }
  return null;
}

/**
 * The path of a program that must be there by now.
 * @param {string} name
 * @returns {string}
 */
export function program(name) {
  const found = findProgram(name);
  if (!found)
    throw new Failure(
      `The program ${name} is missing.`,
      "Run npm start to install what is needed.",
    );
  return found;
}

/**
 * Installs what is missing from Debian. Asks for nothing; without the right to install, says which command to run.
 * @param {("mariadb" | "chromium")[]} needs
 */
export async function ensureDebianPackages(needs) {
  const missing = needs.filter((need) => NEEDS[need].programs.some((name) => !findProgram(name)));
  if (missing.length === 0) return;
  const packages = missing.flatMap((need) => NEEDS[need].packages);
  const byHand = `apt-get update && apt-get install --yes --no-install-recommends ${packages.join(" ")}`;
  const apt = findProgram("apt-get");
  if (!apt) {
    throw new Failure(
      `Missing here: ${packages.join(", ")}, and this machine has no apt-get to install it with.`,
      "Install MariaDB 10.11 (and Chromium, for the browser tests) with this system's own means, then start again.",
    );
  }
  if (process.getuid?.() !== 0) {
    throw new Failure(
      `Missing here: ${packages.join(", ")}. Only root can install it. Run as root:`,
      `  ${byHand}\nthen start again. Cembalo runs a database of its own; the one Debian starts can be switched off:\n  systemctl disable --now mariadb`,
    );
  }
  say(`Installing from Debian: ${packages.join(", ")}`);
  await withoutServiceStart(async () => {
    const env = { DEBIAN_FRONTEND: "noninteractive", NEEDRESTART_MODE: "l" };
    const wait = ["-o", "DPkg::Lock::Timeout=180", "-q"];
    for (const args of [
      ["update", ...wait],
      ["install", "--yes", "--no-install-recommends", ...wait, ...packages],
    ]) {
      const { code, output } = await run(apt, args, { env, letFinish: true });
      if (code !== 0) {
        throw new Failure(
          `apt-get ${args[0]} failed:\n${output.trimEnd().split("\n").slice(-15).join("\n")}`,
          `Run as root, then start again:\n  ${byHand}`,
        );
      }
    }
  });
}

/** Keeps Debian from starting the servers that it installs, and puts back what was there before. */
async function withoutServiceStart(install) {
  const saved = `${POLICY}.before-cembalo`;
  const had = fs.existsSync(POLICY);
  if (had) fs.renameSync(POLICY, saved);
  try {
    fs.writeFileSync(POLICY, "#!/bin/sh\nexit 101\n", { mode: 0o755 });
    await install();
  } finally {
    fs.rmSync(POLICY, { force: true });
    if (had) fs.renameSync(saved, POLICY);
  }
}
