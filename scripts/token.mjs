// Makes an API token and prints it, and nothing else. Argument: the person's address; without one, the demo's music director.
import { Failure, runMain } from "./lib/failure.mjs";
import { withDatabase } from "./lib/installation.mjs";
import { logToStderr } from "./lib/log.mjs";
import { runTypeScript } from "./lib/schema.mjs";
import { readSettings } from "./lib/settings.mjs";

await runMain(async () => {
  logToStderr();
  const email = process.argv[2];
  const { code, output } = await withDatabase(readSettings(), (env) =>
    runTypeScript("scripts/make-token.ts", { args: email ? [email] : [], env }),
  );
  if (code !== 0) throw new Failure(`No token was made: ${output.trim()}`);
  process.stdout.write(`${output.trim()}\n`);
});
