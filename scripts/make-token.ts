// The part of the token command that needs the application's own code. Prints the token, or the reason why there is none.
import fs from "node:fs";
import path from "node:path";
import { createTokenByEmail } from "@/lib/data/tokens";

/** The first person that the demo season lists is its music director. */
function demoDirector(): string | null {
  const file = path.join(import.meta.dirname, "../.run/demo-people.json");
  if (!fs.existsSync(file)) return null;
  const demo = JSON.parse(fs.readFileSync(file, "utf8")) as {
    people?: { email: string; position: string }[];
  };
  const people = demo.people ?? [];
  return (
    (people.find(({ position }) => /^music director/i.test(position)) ?? people[0])?.email ?? null
  );
}

try {
  process.stdout.write(`${await createTokenByEmail(process.argv[2] ?? demoDirector() ?? "")}\n`);
  // The pool of database connections would keep the process alive.
  process.exit(0);
} catch (error) {
  process.stdout.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
}
