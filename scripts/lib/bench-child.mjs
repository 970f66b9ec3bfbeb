// Runs one benchmark in a process of its own, so that what it loads does not weigh on the next.
// Arguments: the benchmark's file, the context as JSON, where to write the result.
import { pathToFileURL } from "node:url";
import { writeJson } from "./paths.mjs";

const [file, context, resultFile] = process.argv.slice(2);
const log = (text) => process.stderr.write(`  ${text}\n`);

try {
  const { default: bench } = await import(pathToFileURL(file).href);
  if (typeof bench !== "function") throw new Error("it has no default export to run");
  const result = await bench({ ...JSON.parse(context), log });
  writeJson(resultFile, { results: [result].flat() });
} catch (error) {
  writeJson(resultFile, { error: error instanceof Error ? error.message : String(error) });
  process.stderr.write(`${error?.stack ?? error}\n`);
}
process.exit(0);
