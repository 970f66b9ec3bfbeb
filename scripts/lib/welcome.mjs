import { print } from "./log.mjs";
import { PEOPLE_FILE } from "./installation.mjs";
import { readJson } from "./paths.mjs";
import { demoPassword } from "./settings.mjs";

const table = (rows) => {
  const widths = rows.reduce(
    (all, row) => row.map((cell, at) => Math.max(all[at] ?? 0, cell.length)),
    [],
  );
  for (const row of rows)
    print(
      `  ${row
        .map((cell, at) => cell.padEnd(widths[at]))
        .join("  ")
        .trimEnd()}`,
    );
};

/**
 * Prints where Cembalo runs and whom to sign in as.
 * @param {string} address
 */
export function welcome(address) {
  print();
  print(`Cembalo is running at ${address}`);
  const demo = readJson(PEOPLE_FILE);
  if (!demo) return;
  print();
  print(`The demo season: sign in with any of these addresses and the password ${demoPassword()}`);
  print();
  table((demo.people ?? []).map(({ position, name, email }) => [position, name, email]));
  if (demo.links?.length) {
    print();
    table(demo.links.map(({ label, path }) => [label, new URL(path, address).href]));
  }
}
