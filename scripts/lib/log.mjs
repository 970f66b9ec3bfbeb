const began = performance.now();

/** Seconds since the command began, for people. */
export const elapsed = () => `${((performance.now() - began) / 1000).toFixed(1)} s`;

let stream = process.stdout;

/** Sends progress to the error stream, for commands whose output is a value. */
export function logToStderr() {
  stream = process.stderr;
}

/**
 * Prints one line of progress with the time since the start.
 * @param {string} text
 */
export function say(text) {
  stream.write(`${`[${elapsed()}]`.padStart(9)} ${text}\n`);
}

/**
 * Prints a line without the time.
 * @param {string} [text]
 */
export function print(text = "") {
  stream.write(`${text}\n`);
}

/**
 * Runs one step: says that it begins, and how long it took when that was worth knowing.
 * @template T
 * @param {string} title
 * @param {() => T | Promise<T>} run
 * @returns {Promise<T>} what the step returned
 */
export async function step(title, run) {
  say(title);
  const from = performance.now();
  const result = await run();
  const seconds = (performance.now() - from) / 1000;
  if (seconds >= 1) say(`  done in ${seconds.toFixed(1)} s`);
  return result;
}
