import fs from "node:fs";
import { readJson } from "./paths.mjs";

/** When the process began, in the kernel's ticks: tells a pid from the same number given out again. */
function beganAt(pid) {
  try {
    const stat = fs.readFileSync(`/proc/${pid}/stat`, "utf8");
    // The name in parentheses may hold spaces: count the fields after it. State Z has ended.
    const fields = stat.slice(stat.lastIndexOf(")") + 2).split(" ");
    return fields[0] === "Z" ? null : fields[19];
  } catch {
    return null;
  }
}

/**
 * Who holds a lock file.
 * @param {string} file
 * @returns {{ pid: number, began: string, mode?: string } | null} null when it is free or its holder has died
 */
export function lockHolder(file) {
  const holder = readJson(file);
  return holder && beganAt(holder.pid) === holder.began ? holder : null;
}

/**
 * Takes a lock file, removing one that a dead process left.
 * @param {string} file
 * @param {Record<string, unknown>} [details] kept in the file for those who find it taken
 * @returns {(() => void) | null} the function that gives it back; null when someone else holds it
 */
export function takeLock(file, details = {}) {
  const content = JSON.stringify({ pid: process.pid, began: beganAt(process.pid), ...details });
  const own = `${file}.${process.pid}`;
  fs.writeFileSync(own, content, { mode: 0o600 });
  try {
    for (let attempt = 0; attempt < 3; attempt += 1) {
      try {
        // A link appears whole or not at all, and only if the name is free.
        fs.linkSync(own, file);
        return () => {
          if (readJson(file)?.pid === process.pid) fs.rmSync(file, { force: true });
        };
      } catch (error) {
        if (error.code !== "EEXIST") throw error;
        if (lockHolder(file)) return null;
        fs.rmSync(file, { force: true });
      }
    }
    return null;
  } finally {
    fs.rmSync(own, { force: true });
  }
}
