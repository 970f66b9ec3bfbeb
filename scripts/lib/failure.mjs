/** A failure a person can act on: what happened, and what to do next. */
export class Failure extends Error {
  /**
   * @param {string} message what happened
   * @param {string} [hint] what to do next
   */
  constructor(message, hint = "") {
    super(message);
    this.hint = hint;
  }
}

/** Raised inside a step when the person has asked to stop. */
export class Stopped extends Error {}

/**
 * Runs a command's main function; a failure is printed in words, without a stack, and ends with code 1.
 * @param {() => Promise<number | void>} main resolves with the exit code
 */
export async function runMain(main) {
  let code;
  try {
    code = (await main()) ?? 0;
  } catch (error) {
    code = error instanceof Stopped ? 0 : 1;
    if (error instanceof Failure) {
      process.stderr.write(`\n${error.message}\n${error.hint ? `${error.hint}\n` : ""}`);
    } else if (!(error instanceof Stopped)) {
      process.stderr.write(`\n${error?.stack ?? error}\n`);
    }
  }
  process.exitCode = code;
  // Output to a pipe is written later: leave when it is out.
  process.stdout.write("", () => process.stderr.write("", () => process.exit(code)));
}
