/**
 * Reads a route as JSON. Throws an Error with the server's own words, or with what to do when it
 * did not answer.
 */
export async function readJson<T>(address: string): Promise<T> {
  const response = await fetch(address, { headers: { accept: "application/json" } });
  if (response.ok) return (await response.json()) as T;
  const body = (await response.json().catch(() => null)) as {
    error?: { message?: string };
  } | null;
  throw new Error(
    body?.error?.message ??
      "The server did not answer. What you see may be old: check the connection.",
  );
}
