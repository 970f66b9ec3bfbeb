type Patience = { what: string; seconds?: number };

/** Asks again until there is an answer, and throws with `what` was waited for when there is none in time. */
export async function until<T>(
  ask: () => T | null | undefined | false | Promise<T | null | undefined | false>,
  { what, seconds = 60 }: Patience,
): Promise<T> {
  const end = Date.now() + seconds * 1000;
  for (;;) {
    const answer = await ask();
    if (answer !== null && answer !== undefined && answer !== false) return answer;
    if (Date.now() > end) throw new Error(`Waited ${String(seconds)} s for ${what}.`);
    await new Promise((resolve) => setTimeout(resolve, 150));
  }
}
