// Prints the address of the running server, and nothing else.
import { runningApp } from "./lib/app.mjs";
import { Failure, runMain } from "./lib/failure.mjs";
import { APP } from "./lib/installation.mjs";

await runMain(async () => {
  const app = await runningApp(APP.stateFile, APP.role);
  if (!app) throw new Failure("Cembalo is not running here.", "Run npm start first.");
  process.stdout.write(`http://localhost:${app.port}\n`);
});
