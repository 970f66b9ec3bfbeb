import type { ActionError, ActionResult } from "@/lib/errors";

/** What an action refused, thrown where a promise has to fail. */
export class Refusal extends Error {
  readonly code: ActionError["code"] | "no-answer";

  constructor(code: ActionError["code"] | "no-answer", message: string) {
    super(message);
    this.name = "Refusal";
    this.code = code;
  }
}

/** The data of an action's answer. Throws a Refusal where it was refused or never arrived. */
export async function orRefuse<T>(asked: Promise<ActionResult<T>>): Promise<T> {
  const result = await asked.catch(() => null);
  if (!result) {
    throw new Refusal(
      "no-answer",
      "The server did not answer, so nothing was changed. Check the connection and try again.",
    );
  }
  if (!result.ok) throw new Refusal(result.error.code, result.error.message);
  return result.data;
}
