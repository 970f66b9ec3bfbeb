export type KeptScore = { scoreId: string; sha256: string; bytes: number };

export const MAX_SCORE_BYTES = 20 * 1024 * 1024;

const LOST =
  "The file did not arrive whole. Nothing was kept: check the connection and choose it again.";

/** SHA-256 as hex; null where the browser offers none, as on an address without HTTPS. */
async function hashOf(bytes: ArrayBuffer): Promise<string | null> {
  // Typed as always there, but only in a secure context is it.
  const subtle = globalThis.crypto.subtle as SubtleCrypto | undefined;
  if (!subtle) return null;
  const digest = new Uint8Array(await subtle.digest("SHA-256", bytes));
  return Array.from(digest, (byte) => byte.toString(16).padStart(2, "0")).join("");
}

/**
 * Sends a score to be read and kept, and makes sure that what the server kept is what was chosen. Throws an Error whose
 * message is for the person: what is wrong with the file and what to do.
 */
export async function uploadScore(productionId: string, file: File): Promise<KeptScore> {
  if (file.size === 0) throw new Error("The file is empty. Export it again and choose it again.");
  if (file.size > MAX_SCORE_BYTES)
    throw new Error("The file is larger than 20 MB. Export it number by number.");
  const bytes = await file.arrayBuffer();
  const sha256 = await hashOf(bytes);
  const form = new FormData();
  form.set("file", new Blob([bytes]), file.name);
  if (sha256 !== null) form.set("sha256", sha256);
  let response: Response;
  try {
    response = await fetch(`/api/productions/${productionId}/score`, {
      method: "POST",
      body: form,
      headers: { accept: "application/json" },
    });
  } catch {
    throw new Error(LOST);
  }
  const body = (await response.json().catch(() => null)) as
    (Partial<KeptScore> & { error?: { message?: string } }) | null;
  if (!response.ok) throw new Error(body?.error?.message ?? LOST);
  if (
    !body?.scoreId ||
    body.bytes !== bytes.byteLength ||
    (sha256 !== null && body.sha256 !== sha256)
  )
    throw new Error(LOST);
  return { scoreId: body.scoreId, sha256: body.sha256 ?? "", bytes: body.bytes };
}
