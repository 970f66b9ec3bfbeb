/** Where an action that ends in a redirect leads; throws what it threw otherwise, or that it did not redirect. */
export async function redirectOf(work: Promise<unknown>): Promise<string> {
  let result: unknown;
  try {
    result = await work;
  } catch (error) {
    const digest = error instanceof Error && "digest" in error ? String(error.digest) : "";
    if (!digest.startsWith("NEXT_REDIRECT")) throw error;
    // NEXT_REDIRECT;<push or replace>;<address>;<status>;
    return digest.split(";").slice(2, -2).join(";");
  }
  throw new Error(`It did not redirect: ${JSON.stringify(result)}`);
}
